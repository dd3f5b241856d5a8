/**
 * Pearson's coefficient of a table whose cells stand at given values.
 *
 * @param cells masses with sum 1, row-major
 * @param x value of each row; length nx
 * @param y value of each column; length ny
 * @returns in [−1, 1]; null when one of the two does not vary
 */
export function pearsonCoefficient(cells: Float64Array, x: Float64Array, y: Float64Array): number | null {
  const ny = y.length
  const mean = { x: 0, y: 0 }
  cells.forEach((mass, cell) => {
    mean.x += mass * x[Math.floor(cell / ny)]
    mean.y += mass * y[cell % ny]
  })
  let xx = 0
  let yy = 0
  let xy = 0
  cells.forEach((mass, cell) => {
    if (mass === 0) return
    const dx = x[Math.floor(cell / ny)] - mean.x
    const dy = y[cell % ny] - mean.y
    xx += mass * dx * dx
    yy += mass * dy * dy
    xy += mass * dx * dy
  })
  return xx > 0 && yy > 0 ? xy / Math.sqrt(xx * yy) : null
}

/**
 * Rank of each bin, for Spearman's coefficient: the share of the mass below it plus half of its own, as for ties.
 *
 * @param masses of the bins, in ascending order of the coordinate
 */
export function binRanks(masses: Float64Array): Float64Array {
  let below = 0
  return masses.map((mass) => {
    const rank = below + mass / 2
    below += mass
    return rank
  })
}
