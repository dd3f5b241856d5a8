import { binMidpoints } from './bin-centroids'
import type { Histogram } from './histogram'

/**
 * Standard deviation of a histogram, each bin spread evenly over its width. On a circle it is √(−2 ln R) with R the length of
 * the mean direction, which a narrow peak brings to the one along a line (Mardia and Jupp, Directional Statistics, 2000, §2.3).
 *
 * @param histogram internal units, at least one weight above 0
 * @returns nm or rad; circular for a dihedral, Infinity where no direction stands out
 * @example histogramDeviation({ kind: 'bond', edges: Float64Array.of(0, 1), weights: Float64Array.of(5), ... }) // √(1/12)
 */
export function histogramDeviation({
  kind,
  edges,
  weights,
}: Pick<Histogram, 'kind' | 'edges' | 'weights'>): number {
  const middles = binMidpoints(edges)
  const widths = middles.map((_, bin) => edges[bin + 1] - edges[bin])
  const total = weights.reduce((sum, weight) => sum + weight, 0)
  const mean = (of: (bin: number) => number): number =>
    weights.reduce((sum, weight, bin) => sum + weight * of(bin), 0) / total
  if (kind !== 'dihedral') {
    const centre = mean((bin) => middles[bin])
    return Math.sqrt(mean((bin) => (middles[bin] - centre) ** 2 + widths[bin] ** 2 / 12))
  }
  // The mean of e^iφ over a bin of half width h is e^im sin(h)/h.
  const shrunk = (bin: number): number => Math.sin(widths[bin] / 2) / (widths[bin] / 2)
  const length = Math.hypot(
    mean((bin) => shrunk(bin) * Math.cos(middles[bin])),
    mean((bin) => shrunk(bin) * Math.sin(middles[bin])),
  )
  return Math.sqrt(-2 * Math.log(Math.min(1, length)))
}
