import { NEWTON_STEP } from './penalised-fit'
import { type TensorFit, tensorFit } from './tensor-fit'
import type { PerAxis } from './tensor-penalty'
import type { TensorSystem } from './tensor-system'

const SOFTEST_LOG = -6
/** Largest λ on the coefficients beside the mean count per coefficient. */
const STIFFEST = 1e8
/** Largest ratio of both λ on the coefficients: beyond, the rounding of the larger would reach the smaller. */
const MOST_UNEQUAL = 1e8
/** A surface this close to the stiff limit of one axis in effective parameters is there: more λ moves nothing. */
const STIFF_DIMENSION = 0.02
/** An axis that was at a limit stays there within this factor: on the border it would come and go for ever. */
const SLACK = 2
/** Where a search starts: about as many bins per effective parameter as an earlier look would want. */
const FIRST_BINS_PER_PARAMETER = 20

/** One look at a pair of λ. */
export interface JointLambdaTrial {
  /** log₁₀ of both λ per bin index. */
  readonly logs: PerAxis<number>
  readonly fit: TensorFit
  /** True on an axis where more λ moves nothing or may not be asked for. */
  readonly stiff: PerAxis<boolean>
}

/** The least log₁₀ λ that a search may visit, where it starts, and the fit at any place in it. */
export interface JointLambdaSearch {
  readonly low: number
  readonly first: PerAxis<number>
  /** λ per bin index = λ on the coefficients / this. */
  readonly scales: PerAxis<number>
  /** Fits at a pair of log₁₀ λ, clipped to the range, starting from another trial. */
  readonly tryAt: (logs: PerAxis<number>, from: JointLambdaTrial | null) => JointLambdaTrial
}

/**
 * λ on the coefficients for one λ per bin index along each axis: that of `splineBasis`, times the bins that one coefficient
 * of the other axis stands for, since the penalty is summed over the lines of coefficients and not of bins.
 */
export function jointLambdaScales({ x, y }: TensorSystem): [number, number] {
  return [
    (x.basis.lambdaScale * y.basis.bins) / y.segments,
    (y.basis.lambdaScale * x.basis.bins) / x.segments,
  ]
}

/**
 * λ on the coefficients for a pair of log₁₀ λ per bin index. Where the surface is stiff to every digit that matters it grows
 * no further, since the rounding of λ D′D would reach the counts, nor beyond 1e8 times the other.
 */
export function coefficientLambdas(
  system: TensorSystem,
  counts: Float64Array,
  logs: PerAxis<number>,
): [number, number] {
  const scales = jointLambdaScales(system)
  const most = stiffest(system, counts)
  const wanted = [Math.min(10 ** logs[0] * scales[0], most), Math.min(10 ** logs[1] * scales[1], most)]
  return [Math.min(wanted[0], MOST_UNEQUAL * wanted[1]), Math.min(wanted[1], MOST_UNEQUAL * wanted[0])]
}

function stiffest({ size }: TensorSystem, counts: Float64Array): number {
  return (STIFFEST * counts.reduce((sum, count) => sum + count, 0)) / size
}

/**
 * Sets up a search for both λ on given counts and offsets.
 *
 * @param counts effective counts, one per cell
 * @param offsets ln of the effective volume of each cell
 */
export function jointLambdaSearch(
  system: TensorSystem,
  counts: Float64Array,
  offsets: Float64Array,
): JointLambdaSearch {
  const scales = jointLambdaScales(system)
  const total = counts.reduce((sum, count) => sum + count, 0)
  const axes = [system.x, system.y] as const
  const low = SOFTEST_LOG
  const firstAlong = (axis: 0 | 1) =>
    Math.log10(total / counts.length) + 6 * Math.log10(axes[axis].basis.bins / FIRST_BINS_PER_PARAMETER)
  const tryAt = (wanted: PerAxis<number>, from: JointLambdaTrial | null): JointLambdaTrial => {
    const softest: PerAxis<number> = [Math.max(wanted[0], low), Math.max(wanted[1], low)]
    const lambdas = coefficientLambdas(system, counts, softest)
    const logs: PerAxis<number> = [Math.log10(lambdas[0] / scales[0]), Math.log10(lambdas[1] / scales[1])]
    const start = from?.fit.coefficients ?? null
    const fit = tensorFit(system, counts, offsets, lambdas, start, NEWTON_STEP.search)
    const rests = (axis: 0 | 1) => {
      const most = Math.min(stiffest(system, counts), MOST_UNEQUAL * lambdas[1 - axis])
      const slack = from?.stiff[axis] ? SLACK : 1
      return lambdas[axis] * slack > most * (1 - 1e-9) || fit.excesses[axis] < STIFF_DIMENSION * slack
    }
    return { logs, fit, stiff: [rests(0), rests(1)] }
  }
  return { low, first: [firstAlong(0), firstAlong(1)], scales, tryAt }
}
