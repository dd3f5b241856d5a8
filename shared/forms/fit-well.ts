import { coordinateDomain } from '../histogram'
import type { FormSolution } from './form-definition'
import type { LikelihoodCells } from './likelihood-cells'
import { linearShape } from './linear-shape'
import { RefusedForm } from './refused-form'
import { solveForm } from './solve-form'

/** The variable x in which a well U = ½ k (x − x0)² is a parabola. */
export interface WellVariable {
  readonly variable: (coordinate: number) => number
  /** The reverse; NaN where no coordinate belongs to x. */
  readonly coordinate: (x: number) => number
  /** Derivative of `coordinate`. */
  readonly slope: (x: number) => number
  /** kJ/mol and x² in terms of the internal units of k. */
  readonly unit: number
}

/**
 * Fits U = ½ k (x − x0)² as η = β₁x + β₂x². Where the best well of an angle lies beyond an end of its domain or opens
 * downwards, x0 is held at an end: the likelihood is concave in β and the wells allowed form a convex cone, so the best of
 * them lies on its rim.
 *
 * @returns k and the coordinate of the well
 * @throws {RefusedForm} UNBOUNDED when no k above 0 is best; OUTSIDE_DOMAIN when a bond's r0 is not above 0
 */
export function fitWell(cells: LikelihoodCells, well: WellVariable): FormSolution {
  const { variable, unit } = well
  const { kind, points } = cells
  const shape = linearShape(points, [variable, (q) => variable(q) ** 2])
  const stiffnessAndVertex = ([linear, square]: Float64Array) => [-2 * square * unit, -linear / (2 * square)]
  const free = solveForm(cells, shape, [0, -0.5], stiffnessAndVertex)
  const [k, vertex] = free.values
  const [low, high] = coordinateDomain(kind)
  const centre = well.coordinate(vertex)
  if (k > 0 && centre > low && centre < high) return atCoordinate(free, well)
  if (kind === 'bond' && k > 0) throw new RefusedForm('OUTSIDE_DOMAIN', 'The best r0 is not above 0.')
  const held = kind === 'bond' ? [] : [low, high].map((end) => heldAt(cells, well, end))
  const rising = held.filter(({ values }) => values[0] > 0)
  if (rising.length > 0) {
    return rising.reduce((one, other) => (other.maximum.value > one.maximum.value ? other : one))
  }
  throw new RefusedForm('UNBOUNDED', 'The best k is not above 0: the curve does not rise outwards.')
}

/** From the vertex in x to the coordinate it belongs to. */
function atCoordinate(solution: FormSolution, { coordinate, slope }: WellVariable): FormSolution {
  const [k, vertex] = solution.values
  const factor = slope(vertex)
  const [kk, kc, ck, cc] = solution.covariance
  return {
    ...solution,
    values: [k, coordinate(vertex)],
    covariance: Float64Array.of(kk, kc * factor, ck * factor, cc * factor * factor),
  }
}

/** The one-parameter fit with the well at an end of the domain. */
function heldAt(cells: LikelihoodCells, { variable, unit }: WellVariable, end: number): FormSolution {
  const feature = (q: number) => (variable(q) - variable(end)) ** 2
  const shape = linearShape(cells.points, [feature])
  const { maximum, covariance, values } = solveForm(cells, shape, [-0.5], ([square]) => [-2 * square * unit])
  return {
    values: [values[0], end],
    covariance: Float64Array.of(covariance[0], 0, 0, 0),
    atBound: [false, true],
    maximum,
  }
}
