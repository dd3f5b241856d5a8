/**
 * Heights of a histogram per unit of its edges: the share of each bin divided by its width, times `factor` (100 where the
 * density is shown in per cent).
 *
 * @param weights counts or masses, length n
 * @param edges ascending, length n + 1
 */
export function measuredHeights(weights: Float64Array, edges: Float64Array, factor = 1): Float64Array {
  const total = weights.reduce((sum, weight) => sum + weight, 0)
  return weights.map((weight, bin) => (factor * weight) / (total * (edges[bin + 1] - edges[bin])))
}
