/**
 * Quantile of type 7 (linear interpolation of order statistics, the default of R and NumPy).
 *
 * @param sorted ascending, not empty
 * @param share in [0, 1]
 * @example quantileSorted([1, 2, 3, 4], 0.25) // 1.75
 */
export function quantileSorted(sorted: ArrayLike<number>, share: number): number {
  const position = share * (sorted.length - 1)
  const below = Math.floor(position)
  const above = Math.min(below + 1, sorted.length - 1)
  return sorted[below] + (position - below) * (sorted[above] - sorted[below])
}
