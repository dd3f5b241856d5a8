/** Sums of a row-major grid over its columns and over its rows. */
export interface Marginals {
  readonly x: Float64Array
  readonly y: Float64Array
}

/**
 * Marginals of a row-major grid.
 *
 * @param cells length nx · ny
 * @param ny cells in a row
 */
export function marginalsOf(cells: Float64Array, ny: number): Marginals {
  const x = new Float64Array(cells.length / ny)
  const y = new Float64Array(ny)
  cells.forEach((mass, cell) => {
    x[Math.floor(cell / ny)] += mass
    y[cell % ny] += mass
  })
  return { x, y }
}

/**
 * Plug-in mutual information Σ p ln[p / (p₁p₂)] of a table, in nats: the mean cost, in kT, of treating two coordinates as
 * independent. Empty cells add nothing.
 *
 * @param cells counts or masses, any common factor, with a positive sum; row-major
 * @param ny cells in a row
 * @returns at least 0 up to rounding
 * @example mutualInformation(Float64Array.of(1, 0, 0, 1), 2) // ln 2
 */
export function mutualInformation(cells: Float64Array, ny: number): number {
  const { x, y } = marginalsOf(cells, ny)
  const total = x.reduce((sum, mass) => sum + mass, 0)
  let information = 0
  cells.forEach((mass, cell) => {
    if (mass > 0) information += mass * Math.log((mass * total) / (x[Math.floor(cell / ny)] * y[cell % ny]))
  })
  return information / total
}

/**
 * Mutual information with the correction of Miller and Madow (Miller 1955, in Information Theory in Psychology II-B, 95),
 * plug-in + (m_x + m_y − m_xy − 1)/(2N) with m the numbers of filled bins and cells. To first order, so good only where
 * cells are well filled.
 *
 * @param independentSamples N > 0
 */
export function mutualInformationMillerMadow(
  cells: Float64Array,
  ny: number,
  independentSamples: number,
): number {
  const { x, y } = marginalsOf(cells, ny)
  const excess = filled(x) + filled(y) - filled(cells) - 1
  return mutualInformation(cells, ny) + excess / (2 * independentSamples)
}

function filled(values: Float64Array): number {
  return values.reduce((count, value) => count + (value > 0 ? 1 : 0), 0)
}

/**
 * Total variation distance ½ Σ |p − p₁p₂| between a table and the product of its marginals: the share of configurations
 * that independence misplaces.
 *
 * @param cells counts or masses with a positive sum; row-major
 * @param ny cells in a row
 * @returns in [0, 1]
 */
export function totalVariation(cells: Float64Array, ny: number): number {
  const { x, y } = marginalsOf(cells, ny)
  const total = x.reduce((sum, mass) => sum + mass, 0)
  let distance = 0
  cells.forEach((mass, cell) => {
    distance += Math.abs(mass - (x[Math.floor(cell / ny)] * y[cell % ny]) / total)
  })
  return distance / (2 * total)
}
