import type { CoordinateKind } from '../histogram'
import { thermalEnergy } from '../units'
import type { InversionSettings } from './inversion-settings'
import type { PreparedBins } from './prepared-bins'
import { coordinateVariance, type FittedCurve, populatedRange } from './smooth-curve'

/**
 * Curve through the raw energies −kT ln(n/V) at the centroids of the bins, from the first to the last filled one (for a
 * dihedral around the turn). Bins without data in between get the energies on the straight line between their filled
 * neighbours: it adds no minimum and no barrier that the data do not show. The deviation is that of a difference of two
 * Poisson counts, kT √(1/n + 1/n_min); NaN in bridged bins.
 *
 * The curve reaches to the outermost centroids only: continued over the half bin beyond, a spline through noise may turn
 * down. An angle that has to be level at 180° reaches that point by its mirror image.
 *
 * @param bins deviations are null where their number of independent samples is
 */
export function rawCurve(
  kind: CoordinateKind,
  temperature: number,
  bins: PreparedBins,
  { straightAngle }: Pick<InversionSettings, 'straightAngle'>,
): FittedCurve {
  const [first, end] = kind === 'dihedral' ? [0, bins.counts.length] : [bins.filled[0], bins.filled[1] + 1]
  const kT = thermalEnergy(temperature)
  const counts = bins.counts.subarray(first, end)
  const volumes = bins.volumes.subarray(first, end)
  const knots = bins.centroids.slice(first, end)
  const raw = counts.map((count, bin) => (count > 0 ? -kT * Math.log(count / volumes[bin]) : NaN))
  const least = raw.reduce(
    (lowest, value, bin) => (value < raw[lowest] || Number.isNaN(raw[lowest]) ? bin : lowest),
    0,
  )
  const deviations = counts.map((count, bin) => {
    if (bin === least) return 0
    return count > 0 ? kT * Math.sqrt(1 / count + 1 / counts[least]) : NaN
  })
  const populated = populatedRange(bins)
  const level = kind === 'angle' && straightAngle === 'level' && populated[1] === Math.PI
  return {
    curve: {
      kind,
      temperature,
      knots,
      energies: bridgeGaps(knots, raw, kind === 'dihedral' ? 2 * Math.PI : null),
      deviations: bins.independentSamples === null ? null : deviations,
      populated,
      reach: [knots[0], level ? Math.PI : knots[knots.length - 1]],
      variance: coordinateVariance(bins),
    },
    range: [first, end],
    leastRaw: raw[least],
    density: null,
  }
}

/** Straight lines over runs of NaN; without a period both ends hold data. */
function bridgeGaps(x: Float64Array, y: Float64Array, period: number | null): Float64Array {
  const count = y.length
  const bridged = Float64Array.from(y)
  const known = Array.from(y.keys()).filter((index) => !Number.isNaN(y[index]))
  known.forEach((start, place) => {
    const wraps = place === known.length - 1
    if (wraps && period === null) return
    const stop = wraps ? known[0] + count : known[place + 1]
    const at = (index: number) => x[index % count] + (index >= count ? (period ?? 0) : 0)
    const slope = (y[stop % count] - y[start]) / (at(stop) - at(start))
    for (let index = start + 1; index < stop; index++) {
      bridged[index % count] = y[start] + slope * (at(index) - at(start))
    }
  })
  return bridged
}
