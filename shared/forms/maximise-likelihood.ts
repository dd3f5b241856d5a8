import { bandedSolve, factorBanded } from '../numeric'
import { likelihoodOf, type LikelihoodPoint, type Shape } from './likelihood'
import type { LikelihoodCells } from './likelihood-cells'
import { correctBySecant } from './secant-correction'

/** Most steps, unless fewer are asked for. */
const MOST_STEPS = 150
/** Half of a decrement is what is left to gain, per sample: 1e-20 is the rounding of the score. */
const FINAL_DECREMENT = 1e-20
/** Below this the gain drowns in the rounding of the likelihood, and steps are taken unseen. */
const UNSEEN_DECREMENT = 1e-12
const FIRST_DAMPING = 1e-3
const LEAST_DAMPING = 1e-9
const MOST_DAMPING = 1e12

/** Where a likelihood is largest, per sample. */
export interface Maximum {
  readonly beta: Float64Array
  readonly value: number
  readonly probabilities: Float64Array
  /** Fisher information of one sample, row-major. */
  readonly information: Float64Array
  /** What the last step was expected to gain, twice over: how far the fit is from having arrived. */
  readonly decrement: number
}

/**
 * Maximises a binned likelihood by Fisher scoring with the damping of Levenberg and Marquardt (Marquardt, J. SIAM 11 (1963)
 * 431), which for a form that is linear in β is Newton's method on a concave function. Where the form misses the data the
 * expected information is not the curvature of the likelihood; `correctBySecant` learns the difference from the steps.
 *
 * @param start β to begin with
 * @param limits.decrement stop when a step would gain less than half of this per sample; coarse values suffice to compare fits
 * @returns where it stopped; whether that is the maximum, its `decrement` says
 */
export function maximiseLikelihood(
  cells: LikelihoodCells,
  shape: Shape,
  start: ArrayLike<number>,
  { decrement = FINAL_DECREMENT, mostSteps = MOST_STEPS } = {},
): Maximum {
  const { newPoint, evaluate } = likelihoodOf(cells, shape)
  let here = newPoint(start)
  let trial = newPoint(start)
  evaluate(here)
  const correction = new Float64Array(shape.size * shape.size)
  let damping = FIRST_DAMPING
  let left = Infinity
  for (let steps = 0; steps < mostSteps; steps++) {
    const step = dampedStep(here, correction, damping)
    if (step === null) {
      damping = Math.max(damping * 10, LEAST_DAMPING)
      if (damping > MOST_DAMPING) break
      continue
    }
    const gain = step.reduce((sum, part, j) => sum + part * here.score[j], 0)
    const damped = damping > FIRST_DAMPING
    const stuck = gain < UNSEEN_DECREMENT && gain >= left
    if (!damped && (gain < decrement || stuck)) return { ...here, decrement: gain }
    for (let j = 0; j < step.length; j++) trial.beta[j] = here.beta[j] + step[j]
    evaluate(trial)
    const unseen = !damped && gain < UNSEEN_DECREMENT
    if (trial.value > here.value || (unseen && trial.value > here.value - UNSEEN_DECREMENT)) {
      left = gain
      correctBySecant(correction, here, trial, step)
      ;[here, trial] = [trial, here]
      damping = damping * 0.1 < LEAST_DAMPING ? 0 : damping * 0.1
    } else {
      damping = Math.max(damping * 10, LEAST_DAMPING)
      if (damping > MOST_DAMPING) break
    }
  }
  return { ...here, decrement: left }
}

/** (I + correction + damping · diag I)⁻¹ · score; null where the matrix is not positive definite. */
function dampedStep(
  { information, score }: LikelihoodPoint,
  correction: Float64Array,
  damping: number,
): Float64Array | null {
  const size = score.length
  const matrix = information.map((entry, index) => entry + correction[index])
  for (let j = 0; j < size; j++) matrix[j * size + j] += damping * information[j * size + j]
  const factor = factorDense(matrix, size)
  return factor && bandedSolve(factor, Float64Array.from(score))
}

/** Inverse of a symmetric positive definite matrix, row-major; null where it is singular to five digits. */
export function invertInformation(information: Float64Array, size: number): Float64Array | null {
  const factor = factorDense(information, size)
  if (factor === null) return null
  const inverse = new Float64Array(size * size)
  for (let row = 0; row < size; row++) {
    const unit = new Float64Array(size)
    unit[row] = 1
    inverse.set(bandedSolve(factor, unit), row * size)
  }
  return inverse
}

/** A dense matrix is a banded one with all its diagonals. */
function factorDense(matrix: Float64Array, size: number) {
  const band = new Float64Array(size * size)
  for (let row = 0; row < size; row++) {
    for (let k = 0; k <= row; k++) band[row * size + k] = matrix[row * size + row - k]
  }
  return factorBanded(band, size, size - 1)
}
