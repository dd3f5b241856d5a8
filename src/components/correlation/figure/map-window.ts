/** Share of the samples that may lie outside the frame at each end of an axis. */
const OUTSIDE = 0.0005

/** Bins shown beyond the last one that counts. */
const MARGIN_BINS = 2

/**
 * The part of an axis worth showing: all bins but the outermost that hold 0.05 % of the samples at either end, and two
 * more, so that a stray sample does not shrink the map. Edges of bins.
 *
 * @param masses of the bins, sum 1
 */
export function axisWindow(edges: ArrayLike<number>, masses: ArrayLike<number>): [low: number, high: number] {
  const bins = masses.length
  let first = 0
  for (let sum = masses[0]; sum <= OUTSIDE && first < bins - 1; sum += masses[first]) first += 1
  let last = bins - 1
  for (let sum = masses[last]; sum <= OUTSIDE && last > first; sum += masses[last]) last -= 1
  return [edges[Math.max(0, first - MARGIN_BINS)], edges[Math.min(bins, last + 1 + MARGIN_BINS)]]
}

/** Share of the samples outside the window of both axes. */
export function shareOutside(
  xEdges: ArrayLike<number>,
  yEdges: ArrayLike<number>,
  masses: ArrayLike<number>,
  x: readonly [number, number],
  y: readonly [number, number],
): number {
  const ny = yEdges.length - 1
  let outside = 0
  for (let index = 0; index < masses.length; index += 1) {
    const ix = Math.floor(index / ny)
    const iy = index % ny
    const inside =
      xEdges[ix] >= x[0] && xEdges[ix + 1] <= x[1] && yEdges[iy] >= y[0] && yEdges[iy + 1] <= y[1]
    if (!inside) outside += masses[index]
  }
  return outside
}
