import { type CoordinateKind, jacobian } from '../histogram'
import { type LambdaChoice, smoothCounts, type SmoothDensity } from '../smoothing'
import { thermalEnergy } from '../units'
import type { PotentialCurve } from './build-potential'
import type { InversionSettings } from './inversion-settings'
import type { PreparedBins } from './prepared-bins'

/** Empty bins beside the filled ones that take part in the fit: at least this many, or this share of the filled range. */
const LEAST_PAD = 4
const PAD_SHARE = 0.1

/** A curve with the bins it was made from. */
export interface FittedCurve {
  readonly curve: PotentialCurve
  /** First bin of the fit and one past the last, counted in the prepared bins. */
  readonly range: readonly [first: number, end: number]
  /** Least raw energy −kT ln(n/V) on the scale of `curve.energies`, kJ/mol. */
  readonly leastRaw: number
  readonly density: SmoothDensity | null
}

/**
 * Smooth curve of a histogram: U = −kT η at the midpoints of the filled range and a pad of empty bins beside it (as far
 * as the histogram goes), for a dihedral of the whole turn. An angle that has to be level at 180° is fitted together with its
 * mirror image there.
 *
 * @param bins with a known number of independent samples
 * @throws {InvalidInputError} SINGULAR_SYSTEM when the counts do not determine a curve
 */
export function smoothCurve(
  kind: CoordinateKind,
  temperature: number,
  bins: PreparedBins,
  { jacobian: useJacobian, straightAngle }: Pick<InversionSettings, 'jacobian' | 'straightAngle'>,
  choice: LambdaChoice,
): FittedCurve {
  const [first, end] = fittedRange(kind, bins)
  const edges = bins.edges.subarray(first, end + 1)
  const midpoints = bins.midpoints.subarray(first, end)
  const counts = bins.counts.subarray(first, end)
  const volumes = bins.volumes.subarray(first, end)
  const mirrored = kind === 'angle' && straightAngle === 'level' && edges[end - first] === Math.PI
  const geometry = {
    edges,
    midpoints,
    volumes,
    jacobian: (coordinate: number) => (useJacobian ? jacobian(kind, coordinate) : 1),
    period: kind === 'dihedral' ? 2 * Math.PI : null,
    mirrored,
  }
  const density = smoothCounts(geometry, counts, choice)
  const kT = thermalEnergy(temperature)
  const curve: PotentialCurve = {
    kind,
    temperature,
    knots: Float64Array.from(midpoints),
    energies: density.eta.map((value) => -kT * value),
    deviations: density.deviations.map((value) => kT * value),
    populated: populatedRange(bins),
    reach: [edges[0], edges[end - first]],
    variance: coordinateVariance(bins),
  }
  const leastRaw =
    -kT *
    counts.reduce(
      (most, count, bin) => (count > 0 ? Math.max(most, Math.log(count / volumes[bin])) : most),
      -Infinity,
    )
  return { curve, range: [first, end], leastRaw, density }
}

function fittedRange(
  kind: CoordinateKind,
  { counts, filled: [first, last] }: PreparedBins,
): [number, number] {
  if (kind === 'dihedral') return [0, counts.length]
  const pad = Math.max(LEAST_PAD, Math.ceil(PAD_SHARE * (last - first + 1)))
  return [Math.max(0, first - pad), Math.min(counts.length, last + 1 + pad)]
}

/** Outer edges of the first and the last filled bin. */
export function populatedRange({ edges, filled: [first, last] }: PreparedBins): [number, number] {
  return [edges[first], edges[last + 1]]
}

/** Variance of the coordinate under the histogram, with the weight of each bin at its midpoint. */
export function coordinateVariance({ counts, midpoints }: PreparedBins): number {
  const total = counts.reduce((sum, count) => sum + count, 0)
  const mean = counts.reduce((sum, count, bin) => sum + count * midpoints[bin], 0) / total
  return counts.reduce((sum, count, bin) => sum + count * (midpoints[bin] - mean) ** 2, 0) / total
}
