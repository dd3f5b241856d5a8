import { InvalidInputError } from '../errors'
import { type BandedFactor, bandedSolve, largestMagnitude } from '../numeric'
import { newtonStep } from './newton-step'
import { NEWTON_STEP } from './penalised-fit'
import { type TensorEvidence, tensorEvidence } from './tensor-evidence'
import { axisRoughness, type PerAxis } from './tensor-penalty'
import { tensorProject, tensorValues } from './tensor-products'
import { factorTensor, type TensorSystem } from './tensor-system'

/** Below this a step that no longer shrinks is rounding. */
const ROUNDING = 1e-6
/** After this many steps only cells that counts speak about are waited for, and to this step. */
const PATIENCE = 30
const IMPATIENT_STEP = 1e-6
/** Steps shorter than this need no check that they descend: the model is close to quadratic there. */
const SAFE_STEP = 0.25
const MOST_STEPS = 120
const MOST_HALVINGS = 60

/** A penalised Poisson fit of a surface: counts n with mean μ = V exp(η) in each cell, η = B_x C B_y′. */
export interface TensorFit extends TensorEvidence {
  /** C, index ix · size_y + iy. */
  readonly coefficients: Float64Array
  /** η at the cell midpoints. */
  readonly eta: Float64Array
  readonly means: Float64Array
  /** |Dβ|² along each axis. */
  readonly roughnesses: PerAxis<number>
  readonly factor: BandedFactor
}

/**
 * Fits a log-linear Poisson model with one roughness penalty per axis: minimises Σ (μ − n ln μ) + (λx/2)|Dx C|² +
 * (λy/2)|C Dy′|² by Newton's method to a step of 1e-10, halving steps that do not descend (Eilers, Currie, Durbán, Comput.
 * Stat. Data Anal. 50 (2006) 61).
 *
 * @param counts not negative, one per cell; fractions are allowed
 * @param offsets ln V, one per cell
 * @param lambdas on the coefficients, above 0
 * @param start coefficients to start from, or null
 * @param converged longest last step of Newton's method, relative to 1 + max |η|
 * @throws {InvalidInputError} SINGULAR_SYSTEM when the counts do not determine a surface
 */
export function tensorFit(
  system: TensorSystem,
  counts: Float64Array,
  offsets: Float64Array,
  lambdas: PerAxis<number>,
  start: Float64Array | null,
  converged: number = NEWTON_STEP.final,
): TensorFit {
  const problem = { system, counts, offsets, lambdas }
  let state = evaluate(problem, start ?? firstGuess(problem))
  let factor = factorTensor(system, state.means, lambdas)
  let previous = Infinity
  for (let step = 0; ; step++) {
    const next = descend(problem, state, bandedSolve(factor, Float64Array.from(state.gradient)))
    const { moved, felt } = newtonStep(state, next)
    state = next
    factor = factorTensor(system, state.means, lambdas)
    const scale = 1 + largestMagnitude(state.eta)
    if (moved <= converged * scale || (moved < ROUNDING * scale && moved >= previous)) break
    if (step >= PATIENCE && felt < IMPATIENT_STEP) break
    if (step === MOST_STEPS) throw undetermined()
    previous = moved
  }
  const { coefficients, eta, means, roughnesses } = state
  const evidence = tensorEvidence(system, counts, means, lambdas, factor)
  return { coefficients, eta, means, roughnesses, ...evidence, factor }
}

interface Problem {
  readonly system: TensorSystem
  readonly counts: Float64Array
  readonly offsets: Float64Array
  readonly lambdas: PerAxis<number>
}

interface State {
  readonly coefficients: Float64Array
  readonly eta: Float64Array
  readonly means: Float64Array
  readonly roughnesses: PerAxis<number>
  /** Of the penalised log-likelihood, in the order of the band. */
  readonly gradient: Float64Array
  readonly objective: number
}

function evaluate({ system, counts, offsets, lambdas }: Problem, coefficients: Float64Array): State {
  const { x, y, hold, places } = system
  const eta = tensorValues(x.basis, y.basis, coefficients)
  const means = new Float64Array(eta.length)
  const residuals = new Float64Array(eta.length)
  let objective = 0
  for (let cell = 0; cell < eta.length; cell++) {
    means[cell] = Math.exp(offsets[cell] + eta[cell])
    residuals[cell] = counts[cell] - means[cell]
    objective += means[cell] - counts[cell] * eta[cell]
  }
  const [nx, ny] = [x.basis.size, y.basis.size]
  const alongX = axisRoughness(x.basis, coefficients, ny, ny, 1)
  const alongY = axisRoughness(y.basis, coefficients, 1, nx, ny)
  objective += 0.5 * (lambdas[0] * alongX.roughness + lambdas[1] * alongY.roughness)
  const pull = tensorProject(x.basis, y.basis, residuals)
  const gradient = new Float64Array(pull.length)
  for (let index = 0; index < pull.length; index++) {
    const away = coefficients[index] - hold.level
    objective += 0.5 * hold.strength * away * away
    const stiffness = lambdas[0] * alongX.stiffness[index] + lambdas[1] * alongY.stiffness[index]
    gradient[places[index]] = pull[index] - stiffness - hold.strength * away
  }
  const roughnesses: PerAxis<number> = [alongX.roughness, alongY.roughness]
  return { coefficients, eta, means, roughnesses, gradient, objective }
}

function descend(problem: Problem, state: State, direction: Float64Array): State {
  const { places } = problem.system
  const longest = largestMagnitude(direction)
  let share = 1
  for (let halving = 0; halving < MOST_HALVINGS; halving++) {
    const moved = state.coefficients.map((value, index) => value + share * direction[places[index]])
    const next = evaluate(problem, moved)
    if (share * longest < SAFE_STEP || next.objective <= state.objective) return next
    share /= 2
  }
  throw undetermined()
}

/** One weighted least-squares fit to ln((n + ½)/V). */
function firstGuess({ system, counts, offsets, lambdas }: Problem): Float64Array {
  const { x, y, hold, places } = system
  const weights = counts.map((count) => count + 0.5)
  const targets = weights.map((value, cell) => value * (Math.log(value) - offsets[cell]))
  const pull = tensorProject(x.basis, y.basis, targets)
  const right = new Float64Array(pull.length)
  pull.forEach((value, index) => (right[places[index]] = value + hold.strength * hold.level))
  const solved = bandedSolve(factorTensor(system, weights, lambdas), right)
  return pull.map((_, index) => solved[places[index]])
}

function undetermined(): InvalidInputError {
  return new InvalidInputError('SINGULAR_SYSTEM', 'The counts do not determine a smooth surface.')
}
