import { InvalidInputError } from '../errors'
import type { Histogram } from './histogram'

/**
 * Merges neighbouring bins in groups. The last group is smaller where the number of bins is no multiple of the factor.
 *
 * @param factor whole number of bins to merge into one, at least 1
 * @returns histogram with ⌈n / factor⌉ bins and the same total
 * @throws {InvalidInputError} SETTING_INVALID when the factor is not a whole number of at least 1
 */
export function rebin(histogram: Histogram, factor: number): Histogram {
  if (!(Number.isInteger(factor) && factor >= 1)) {
    throw new InvalidInputError('SETTING_INVALID', 'Bins are merged in whole numbers of at least 1.', {
      field: 'factor',
    })
  }
  const bins = histogram.weights.length
  const merged = Math.ceil(bins / factor)
  const weights = new Float64Array(merged)
  histogram.weights.forEach((weight, bin) => (weights[Math.floor(bin / factor)] += weight))
  const edges = Float64Array.from(
    { length: merged + 1 },
    (_, edge) => histogram.edges[Math.min(edge * factor, bins)],
  )
  return { ...histogram, edges, weights }
}
