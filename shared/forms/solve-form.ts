import type { FormSolution } from './form-definition'
import type { Shape } from './likelihood'
import type { LikelihoodCells } from './likelihood-cells'
import { invertInformation, type Maximum, maximiseLikelihood } from './maximise-likelihood'
import { RefusedForm } from './refused-form'

/** Step of the numerical derivative of the parameters, in standard errors of a single sample. */
const STEP = 1e-5
/** A fit that stops above this has not arrived: parameters may still move by 1e-5 of the error of a single sample. */
const ARRIVED_DECREMENT = 1e-10

/**
 * Maximises the likelihood of a shape and gives the parameters of its formula with their covariance, by the delta method
 * with central differences.
 *
 * @param natural from β to the parameters of the formula
 * @throws {RefusedForm} NOT_CONVERGED; DEGENERATE when the counts do not tell the parameters apart; what `natural` throws
 */
export function solveForm(
  cells: LikelihoodCells,
  shape: Shape,
  start: ArrayLike<number>,
  natural: (beta: Float64Array) => number[],
): FormSolution {
  const maximum = maximiseLikelihood(cells, shape, start)
  if (!(maximum.decrement < ARRIVED_DECREMENT)) {
    throw new RefusedForm('NOT_CONVERGED', 'The likelihood has no maximum that the fit could reach.')
  }
  return solutionAt(maximum, natural)
}

/** The solution that belongs to a maximum; throws as `solveForm`. */
export function solutionAt(maximum: Maximum, natural: (beta: Float64Array) => number[]): FormSolution {
  const { beta, information } = maximum
  const inverse = invertInformation(information, beta.length)
  if (inverse === null) {
    throw new RefusedForm('DEGENERATE', 'The counts do not tell the parameters of this form apart.')
  }
  const values = natural(beta)
  const derivatives = Array.from(beta, (_, j) => {
    const step = STEP * Math.sqrt(inverse[j * beta.length + j])
    const [below, above] = [-step, step].map((shift) => {
      const moved = Float64Array.from(beta)
      moved[j] += shift
      return natural(moved)
    })
    return above.map((value, row) => (value - below[row]) / (2 * step))
  })
  return {
    values,
    covariance: sandwich(derivatives, inverse, values.length),
    atBound: values.map(() => false),
    maximum,
  }
}

/** J C Jᵀ with the columns of J. */
function sandwich(columns: readonly number[][], inner: Float64Array, rows: number): Float64Array {
  const size = columns.length
  const outer = new Float64Array(rows * rows)
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < rows; column++) {
      let sum = 0
      for (let j = 0; j < size; j++) {
        for (let k = 0; k < size; k++) sum += columns[j][row] * inner[j * size + k] * columns[k][column]
      }
      outer[row * rows + column] = sum
    }
  }
  return outer
}
