import { InvalidInputError } from '../errors'

/**
 * Counts samples into bins. Bins are half-open, the last one closed.
 *
 * @param samples internal units
 * @param edges ascending, length n + 1
 * @returns counts, length n
 * @throws {InvalidInputError} NUMBER_NOT_FINITE or EDGE_OUT_OF_RANGE with the index of the first sample that is not a
 *   number or lies outside the bins
 * @example accumulate([0, 1, 2], Float64Array.of(0, 1, 2)) // 1, 2
 */
export function accumulate(samples: ArrayLike<number>, edges: Float64Array): Float64Array {
  const counts = new Float64Array(edges.length - 1)
  for (let index = 0; index < samples.length; index++) counts[binOf(samples[index], edges, index)] += 1
  return counts
}

/**
 * The bin a sample falls into, by bisection; bins are half-open, the last one closed.
 *
 * @param index position of the sample in its list, for the error
 * @throws {InvalidInputError} NUMBER_NOT_FINITE; EDGE_OUT_OF_RANGE
 */
export function binOf(sample: number, edges: Float64Array, index: number): number {
  const last = edges.length - 1
  if (!(sample >= edges[0] && sample <= edges[last])) {
    throw Number.isFinite(sample)
      ? new InvalidInputError('EDGE_OUT_OF_RANGE', `Sample ${index + 1} lies outside the bins.`, { index })
      : new InvalidInputError('NUMBER_NOT_FINITE', `Sample ${index + 1} is not a finite number.`, { index })
  }
  let low = 0
  let high = last
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (edges[middle] <= sample) low = middle
    else high = middle
  }
  return low
}
