import { InvalidInputError } from '../errors'
import type { JointHistogram } from '../histogram'
import { SETTING_LIMITS, type SmoothingCriterion } from '../inversion'
import { type JointLambdaChoice, smoothJointCounts, type SmoothJointDensity } from '../smoothing'
import { type CoordinateKind, thermalEnergy } from '../units'
import { buildSurface, type SurfacePoint } from './build-surface'
import { type JointBins, jointBins } from './joint-bins'
import type { JointPotentialSettings, JointSmoothingSettings } from './joint-potential-settings'
import { type JointWarning, jointWarnings } from './joint-potential-warnings'
import { jointEnergy, type JointSurface } from './joint-surface'

/** How a joint potential was smoothed. */
export interface JointSmoothing {
  readonly mode: 'auto' | 'manual'
  /** Null where λ was given. */
  readonly criterion: SmoothingCriterion | null
  /** Per bin index along each axis, on counts divided by the statistical inefficiency; rounded to 0.01. */
  readonly log10Lambdas: readonly [x: number, y: number]
  readonly effectiveDimension: number
}

/** A joint potential on the cells that took part in the fit, row-major; internal units. */
export interface JointKnots {
  /** Midpoints of the bins of each axis, nm or rad. */
  readonly x: Float64Array
  readonly y: Float64Array
  /** U in kJ/mol, index ix · ny + iy. */
  readonly energies: Float64Array
  /** Posterior standard deviation of U − U_min, kJ/mol; large where no data are. */
  readonly deviations: Float64Array
  /** −kT ln(n/V) in kJ/mol before smoothing, laid over the surface; NaN for an empty cell. */
  readonly rawEnergies: Float64Array
}

/** The joint potential of two coordinates with the evidence beside it; plain data, internal units (nm, rad, kJ/mol, K). */
export interface JointPotential {
  readonly kinds: readonly [CoordinateKind, CoordinateKind]
  readonly temperature: number
  readonly settings: JointPotentialSettings
  readonly surface: JointSurface
  readonly knots: JointKnots
  readonly minimum: SurfacePoint
  readonly smoothing: JointSmoothing
  readonly independentSamples: number
  readonly warnings: readonly JointWarning[]
}

/**
 * Joint potential of two coordinates, U = −kT ln(n_ij/(V_i V_j)) with the exact volumes of the bins, smoothed as a penalised
 * Poisson log-density by a tensor of B-splines with one λ per axis (see `smoothJointCounts`). Counts without a stated number
 * of independent samples are taken as independent.
 *
 * @param joint internal units
 * @param temperature K
 * @returns surface, knots, evidence and warnings
 * @throws {InvalidInputError} TEMPERATURE_INVALID; SETTING_INVALID with the field; SAMPLE_SIZE_UNKNOWN for a density or
 *   probability that nobody stated a number of samples for; TOO_FEW_BINS when fewer than 5 bins of an axis hold data;
 *   TOO_FEW_SAMPLES when counts stand for less than 1; SINGULAR_SYSTEM when the counts do not determine a surface
 */
export function jointPotential(
  joint: JointHistogram,
  temperature: number,
  settings: JointPotentialSettings,
): JointPotential {
  const kT = thermalEnergy(temperature)
  const choice = lambdaChoice(settings.smoothing)
  const bins = jointBins(joint, settings.jacobian)
  const [x, y] = bins.axes
  const density = smoothJointCounts(x.geometry, y.geometry, bins.counts, choice)
  const { surface, minimum } = buildSurface(bins, density, temperature)
  return {
    kinds: joint.kinds,
    temperature,
    settings,
    surface,
    knots: jointKnots(bins, density, surface, kT),
    minimum,
    smoothing: {
      mode: settings.smoothing.mode,
      criterion: settings.smoothing.mode === 'auto' ? settings.smoothing.criterion : null,
      log10Lambdas: density.log10Lambdas,
      effectiveDimension: density.effectiveDimension,
    },
    independentSamples: bins.independentSamples,
    warnings: jointWarnings(bins, density),
  }
}

function lambdaChoice(smoothing: JointSmoothingSettings): JointLambdaChoice {
  if (smoothing.mode === 'auto') return { by: smoothing.criterion }
  const { low, high } = SETTING_LIMITS.log10Lambda
  if (smoothing.log10Lambdas.every((value) => value >= low && value <= high)) {
    return { log10Lambdas: smoothing.log10Lambdas }
  }
  throw new InvalidInputError('SETTING_INVALID', `Both log10 λ must lie between ${low} and ${high}.`, {
    field: 'log10Lambdas',
  })
}

function jointKnots(
  { axes: [x, y], counts }: JointBins,
  density: SmoothJointDensity,
  surface: JointSurface,
  kT: number,
): JointKnots {
  const [xs, ys] = [x.geometry.midpoints, y.geometry.midpoints]
  const ny = ys.length
  const at = (cell: number): [number, number] => [Math.floor(cell / ny), cell % ny]
  const energies = counts.map((_, cell) => {
    const [column, row] = at(cell)
    return jointEnergy(surface, xs[column], ys[row])
  })
  // Where η is largest the surface stands as it was fitted: raw energies share its constant from there.
  const mode = density.eta.indexOf(density.eta.reduce((most, value) => Math.max(most, value), -Infinity))
  const constant = energies[mode] + kT * density.eta[mode]
  const rawEnergies = counts.map((count, cell) => {
    const [column, row] = at(cell)
    const volume = x.geometry.volumes[column] * y.geometry.volumes[row]
    return count > 0 ? constant - kT * Math.log(count / volume) : NaN
  })
  return { x: xs, y: ys, energies, deviations: density.deviations.map((value) => kT * value), rawEnergies }
}
