import { InvalidInputError } from '../errors'
import { type BandedFactor, bandedSolve, dot, largestMagnitude, selectedInverse } from '../numeric'
import { newtonStep } from './newton-step'
import {
  binValues,
  binVariances,
  factorSystem,
  type PenalisedSystem,
  projectBins,
  thirdDifferences,
  transposedDifferences,
} from './penalised-system'

/**
 * Step of η, relative to 1 + max |η|, after which Newton's method stops. It converges quadratically: after the last step
 * the error is about the square of this.
 */
export const NEWTON_STEP = { final: 1e-10, search: 1e-3 }
/** Below this a step that no longer shrinks is rounding. */
const ROUNDING = 1e-6
/**
 * After this many steps only bins that counts speak about are waited for, and to this step: far from all data, beside a
 * wall, the curve may be too deep for doubles to settle.
 */
const PATIENCE = 30
const IMPATIENT_STEP = 1e-6
/** Steps shorter than this need no check that they descend: the model is close to quadratic there. */
const SAFE_STEP = 0.25
/**
 * λ on the coefficients beside the mean count per coefficient at which the curve is stiff to every digit that matters (it is
 * within 1e-5 of its own deviation of the limit λ → ∞ even with hundreds of bins); more would only add rounding.
 */
const STIFFEST = 1e16
const MOST_STEPS = 120
/** A loose fit that has not settled by now, as beside a wall with a λ far too small, is good enough to look for a better λ. */
const MOST_LOOSE_STEPS = 40
const MOST_HALVINGS = 60

/** A penalised Poisson fit: counts n_i with mean μ_i = V_i exp(η_i). */
export interface PenalisedFit {
  readonly coefficients: Float64Array
  /** η at the bin midpoints. */
  readonly eta: Float64Array
  /** Expected counts. */
  readonly means: Float64Array
  /** |Dβ|² */
  readonly roughness: number
  /** Posterior variance of η at each bin, diag(B H⁻¹ B′) with H = B′ diag(μ) B + λ D′D. */
  readonly variances: Float64Array
  /** tr(H⁻¹ B′ diag(μ) B) */
  readonly effectiveDimension: number
  /** 2 Σ [n ln(n/μ) − (n − μ)] */
  readonly deviance: number
  readonly factor: BandedFactor
}

/**
 * Fits a log-linear Poisson model with a roughness penalty: minimises Σ (μ_i − n_i ln μ_i) + (λ/2)|Dβ|² by Newton's
 * method to a step of 1e-10, halving steps that do not descend (Eilers & Marx, Stat. Sci. 11 (1996) 89).
 *
 * @param counts not negative, one per bin; fractions are allowed
 * @param offsets ln V, one per bin
 * @param lambda per bin index, above 0; from `stiffestWeight` on, the fit is the one at that weight
 * @param start coefficients to start from, or null
 * @param converged longest last step of Newton's method; above `NEWTON_STEP.final` a fit that does not settle is taken as it is
 * @throws {InvalidInputError} SINGULAR_SYSTEM when the counts do not determine a curve (too few filled bins)
 */
export function penalisedFit(
  system: PenalisedSystem,
  counts: Float64Array,
  offsets: Float64Array,
  lambda: number,
  start: Float64Array | null,
  converged: number = NEWTON_STEP.final,
): PenalisedFit {
  const weight = Math.min(lambda * system.basis.lambdaScale, stiffestWeight(system, counts))
  let state = evaluate(system, counts, offsets, weight, start ?? firstGuess(system, counts, offsets, weight))
  let factor = factorSystem(system, state.means, weight)
  let previous = Infinity
  for (let step = 0; ; step++) {
    const direction = bandedSolve(factor, Float64Array.from(state.gradient))
    const next = descend(system, counts, offsets, weight, state, direction)
    const { moved, felt } = newtonStep(state, next)
    state = next
    factor = factorSystem(system, state.means, weight)
    const scale = 1 + largestMagnitude(state.eta)
    if (moved <= converged * scale || (moved < ROUNDING * scale && moved >= previous)) break
    if (step >= PATIENCE && felt < IMPATIENT_STEP) break
    if (step === MOST_LOOSE_STEPS && converged > NEWTON_STEP.final) break
    if (step === MOST_STEPS) {
      throw new InvalidInputError('SINGULAR_SYSTEM', 'The counts do not determine a smooth curve.')
    }
    previous = moved
  }
  const variances = binVariances(system, selectedInverse(factor))
  return {
    coefficients: state.coefficients,
    eta: state.eta,
    means: state.means,
    roughness: state.roughness,
    variances,
    effectiveDimension: dot(state.means, variances),
    deviance: deviance(counts, state.means),
    factor,
  }
}

/** λ on the coefficients beyond which a fit no longer changes; see `penalisedFit`. */
export function stiffestWeight({ basis }: PenalisedSystem, counts: Float64Array): number {
  return (STIFFEST * counts.reduce((sum, count) => sum + count, 0)) / basis.size
}

interface State {
  readonly coefficients: Float64Array
  readonly eta: Float64Array
  readonly means: Float64Array
  readonly roughness: number
  /** Of the penalised log-likelihood, in the order of the band. */
  readonly gradient: Float64Array
  readonly objective: number
}

function evaluate(
  system: PenalisedSystem,
  counts: Float64Array,
  offsets: Float64Array,
  weight: number,
  coefficients: Float64Array,
): State {
  const { basis, places, hold } = system
  const eta = binValues(basis, coefficients)
  const means = new Float64Array(basis.bins)
  const residuals = new Float64Array(basis.bins)
  let objective = 0
  for (let bin = 0; bin < basis.bins; bin++) {
    means[bin] = Math.exp(offsets[bin] + eta[bin])
    residuals[bin] = counts[bin] - means[bin]
    objective += means[bin] - counts[bin] * eta[bin]
  }
  const differences = thirdDifferences(basis, coefficients)
  const pull = projectBins(basis, residuals)
  // D′(Dβ) in two steps, not (D′D)β: the polynomial part cancels in the first and takes its rounding with it.
  const stiffness = transposedDifferences(basis, differences)
  let roughness = 0
  for (let row = 0; row < differences.length; row++) roughness += differences[row] * differences[row]
  objective += 0.5 * weight * roughness
  const gradient = new Float64Array(basis.size)
  for (let index = 0; index < basis.size; index++) {
    const away = coefficients[index] - hold.level
    objective += 0.5 * hold.strength * away * away
    gradient[places[index]] = pull[index] - weight * stiffness[index] - hold.strength * away
  }
  return { coefficients, eta, means, roughness, gradient, objective }
}

function descend(
  system: PenalisedSystem,
  counts: Float64Array,
  offsets: Float64Array,
  weight: number,
  state: State,
  direction: Float64Array,
): State {
  const { places } = system
  const longest = largestMagnitude(direction)
  let share = 1
  for (let halving = 0; halving < MOST_HALVINGS; halving++) {
    const moved = new Float64Array(direction.length)
    for (let index = 0; index < moved.length; index++) {
      moved[index] = state.coefficients[index] + share * direction[places[index]]
    }
    const next = evaluate(system, counts, offsets, weight, moved)
    if (share * longest < SAFE_STEP || next.objective <= state.objective) return next
    share /= 2
  }
  throw new InvalidInputError('SINGULAR_SYSTEM', 'The counts do not determine a smooth curve.')
}

/** One weighted least-squares fit to ln((n + ½)/V). */
function firstGuess(
  system: PenalisedSystem,
  counts: Float64Array,
  offsets: Float64Array,
  weight: number,
): Float64Array {
  const weights = counts.map((count) => count + 0.5)
  const targets = weights.map((value, bin) => value * (Math.log(value) - offsets[bin]))
  const pull = projectBins(system.basis, targets)
  const right = new Float64Array(pull.length)
  for (let index = 0; index < pull.length; index++) {
    right[system.places[index]] = pull[index] + system.hold.strength * system.hold.level
  }
  const solved = bandedSolve(factorSystem(system, weights, weight), right)
  return pull.map((_, index) => solved[system.places[index]])
}

function deviance(counts: Float64Array, means: Float64Array): number {
  let sum = 0
  for (let bin = 0; bin < counts.length; bin++) {
    const [count, mean] = [counts[bin], means[bin]]
    sum += mean - count + (count > 0 ? count * Math.log(count / mean) : 0)
  }
  return 2 * sum
}
