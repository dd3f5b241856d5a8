import { seriesInefficiency, type SeriesInefficiency } from '../numeric'
import type { CoordinateKind } from '../units'

/**
 * Statistical inefficiency of raw samples of a coordinate in the order of time, as evidence beside the g of blocks: a mean
 * and the counts of a histogram do not forget equally fast. A dihedral has no mean, so cos φ and sin φ speak for it, whichever
 * remembers longer.
 *
 * @param samples at least 2, nm or rad
 * @returns null when all samples are equal
 * @throws {InvalidInputError} as `seriesInefficiency`
 */
export function sampleInefficiency(kind: CoordinateKind, samples: Float64Array): SeriesInefficiency | null {
  if (kind !== 'dihedral') return seriesInefficiency(samples)
  const parts = [Math.cos, Math.sin].map((part) => seriesInefficiency(samples.map((angle) => part(angle))))
  const of = (part: SeriesInefficiency | null): number => part?.autocorrelation.inefficiency ?? 0
  return of(parts[0]) >= of(parts[1]) ? parts[0] : parts[1]
}
