import { InvalidInputError } from '../errors'
import { type BandedFactor, bandedSolve, selectedInverse } from '../numeric'
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
/** Steps shorter than this need no check that they descend: the model is close to quadratic there. */
const SAFE_STEP = 0.25
const MOST_STEPS = 300
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
 * @param volumes V, one per bin; 0 marks a bin that was not observed and that only the penalty determines
 * @param lambda per bin index, above 0
 * @param start coefficients to start from, or null
 * @param converged longest last step of Newton's method
 * @throws {InvalidInputError} SINGULAR_SYSTEM when the counts do not determine a curve (too few filled bins)
 */
export function penalisedFit(
  system: PenalisedSystem,
  counts: Float64Array,
  volumes: Float64Array,
  lambda: number,
  start: Float64Array | null,
  converged: number = NEWTON_STEP.final,
): PenalisedFit {
  const weight = lambda * system.basis.lambdaScale
  let state = evaluate(system, counts, volumes, weight, start ?? firstGuess(system, counts, volumes, weight))
  let factor = factorSystem(system, state.means, weight)
  let previous = Infinity
  for (let step = 0; ; step++) {
    const direction = bandedSolve(factor, Float64Array.from(state.gradient))
    const next = descend(system, counts, volumes, weight, state, direction)
    const moved = largestDifference(next.eta, state.eta)
    state = next
    factor = factorSystem(system, state.means, weight)
    const scale = 1 + largest(state.eta)
    if (moved <= converged * scale || (moved < ROUNDING * scale && moved >= previous)) break
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
  volumes: Float64Array,
  weight: number,
  coefficients: Float64Array,
): State {
  const { basis, places } = system
  const eta = binValues(basis, coefficients)
  const means = new Float64Array(basis.bins)
  const residuals = new Float64Array(basis.bins)
  let objective = 0
  for (let bin = 0; bin < basis.bins; bin++) {
    // A bin that was not observed has mean 0 whatever η is there.
    means[bin] = volumes[bin] === 0 ? 0 : volumes[bin] * Math.exp(eta[bin])
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
    gradient[places[index]] = pull[index] - weight * stiffness[index]
  }
  return { coefficients, eta, means, roughness, gradient, objective }
}

function descend(
  system: PenalisedSystem,
  counts: Float64Array,
  volumes: Float64Array,
  weight: number,
  state: State,
  direction: Float64Array,
): State {
  const { places } = system
  const longest = largest(direction)
  let share = 1
  for (let halving = 0; halving < MOST_HALVINGS; halving++) {
    const moved = new Float64Array(direction.length)
    for (let index = 0; index < moved.length; index++) {
      moved[index] = state.coefficients[index] + share * direction[places[index]]
    }
    const next = evaluate(system, counts, volumes, weight, moved)
    if (share * longest < SAFE_STEP || next.objective <= state.objective) return next
    share /= 2
  }
  throw new InvalidInputError('SINGULAR_SYSTEM', 'The counts do not determine a smooth curve.')
}

/** One weighted least-squares fit to ln((n + ½)/V). */
function firstGuess(
  system: PenalisedSystem,
  counts: Float64Array,
  volumes: Float64Array,
  weight: number,
): Float64Array {
  const weights = counts.map((count, bin) => (volumes[bin] === 0 ? 0 : count + 0.5))
  const targets = weights.map((value, bin) => (value === 0 ? 0 : value * Math.log(value / volumes[bin])))
  const pull = projectBins(system.basis, targets)
  const right = new Float64Array(pull.length)
  for (let index = 0; index < pull.length; index++) right[system.places[index]] = pull[index]
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

function dot(one: Float64Array, other: Float64Array): number {
  let sum = 0
  for (let index = 0; index < one.length; index++) sum += one[index] * other[index]
  return sum
}

function largest(values: Float64Array): number {
  let most = 0
  for (let index = 0; index < values.length; index++) most = Math.max(most, Math.abs(values[index]))
  return most
}

function largestDifference(one: Float64Array, other: Float64Array): number {
  let most = 0
  for (let index = 0; index < one.length; index++) most = Math.max(most, Math.abs(one[index] - other[index]))
  return most
}
