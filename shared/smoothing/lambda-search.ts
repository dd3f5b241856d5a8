import { NEWTON_STEP, type PenalisedFit, penalisedFit, stiffestWeight } from './penalised-fit'
import type { PenalisedSystem } from './penalised-system'
import { penaltyNullity } from './smoothing-basis'

const SOFTEST_LOG = -6
/** A curve this close to the stiff limit in effective dimension is there: more λ moves nothing. */
const STIFF_DIMENSION = 0.02
/** Where a search starts: a curve with about as many effective parameters as an earlier look would want. */
const FIRST_BINS_PER_PARAMETER = 40

/** One look at a λ. */
export interface LambdaTrial {
  /** log₁₀ of λ per bin index. */
  readonly log10Lambda: number
  readonly fit: PenalisedFit
  /** Effective dimension beyond what the penalty does not see. */
  readonly excess: number
  /** True where more λ moves nothing. */
  readonly stiff: boolean
}

/** The range of log₁₀ λ a search may visit, where it starts, and the fit at any place in it. */
export interface LambdaSearch {
  readonly low: number
  readonly high: number
  readonly first: number
  /** λ per bin index = λ on the coefficients / this. */
  readonly lambdaScale: number
  /** Fits at log₁₀ λ, clipped to the range, starting from another trial. */
  readonly tryAt: (log10Lambda: number, from: LambdaTrial | null) => LambdaTrial
}

/**
 * Sets up a search for λ on given counts and offsets.
 *
 * @param counts effective counts, one per bin
 * @param offsets ln of the effective volume of each bin
 */
export function lambdaSearch(
  system: PenalisedSystem,
  counts: Float64Array,
  offsets: Float64Array,
): LambdaSearch {
  const { lambdaScale } = system.basis
  const nullity = penaltyNullity(system.basis)
  const total = counts.reduce((sum, count) => sum + count, 0)
  const low = SOFTEST_LOG
  const high = Math.log10(stiffestWeight(system, counts) / lambdaScale)
  const first = Math.log10(total / counts.length) + 6 * Math.log10(counts.length / FIRST_BINS_PER_PARAMETER)
  const tryAt = (wanted: number, from: LambdaTrial | null): LambdaTrial => {
    const log10Lambda = Math.min(Math.max(wanted, low), high)
    const start = from?.fit.coefficients ?? null
    const fit = penalisedFit(system, counts, offsets, 10 ** log10Lambda, start, NEWTON_STEP.search)
    const excess = fit.effectiveDimension - nullity
    return { log10Lambda, fit, excess, stiff: excess < STIFF_DIMENSION }
  }
  return { low, high, first, lambdaScale, tryAt }
}
