import { dot } from '../numeric'
import type { LikelihoodPoint } from './likelihood'

/**
 * Learns what the expected information lacks of the curvature of a likelihood from one step: the least change of the
 * symmetric correction that makes (information + correction) · step the change of the score, sized down first when it was
 * learnt from longer steps (Dennis, Gay, Welsch, ACM Trans. Math. Softw. 7 (1981) 348). A step along which the likelihood
 * is not concave teaches nothing.
 *
 * @param correction row-major, changed in place
 */
export function correctBySecant(
  correction: Float64Array,
  before: LikelihoodPoint,
  after: LikelihoodPoint,
  step: Float64Array,
): void {
  const size = step.length
  const change = step.map((_, j) => before.score[j] - after.score[j])
  const curvature = dot(step, change)
  if (!(curvature > 0)) return
  const wanted = times(after.information, step).map((expected, j) => change[j] - expected)
  const known = times(correction, step)
  const sized = Math.min(1, Math.abs(dot(step, wanted)) / Math.abs(dot(step, known)) || 0)
  const rest = wanted.map((value, j) => value - sized * known[j])
  const along = dot(step, rest) / curvature
  for (let j = 0; j < size; j++) {
    for (let k = 0; k < size; k++) {
      const index = j * size + k
      const turned = rest[j] * change[k] + change[j] * rest[k] - along * change[j] * change[k]
      correction[index] = sized * correction[index] + turned / curvature
    }
  }
}

function times(matrix: Float64Array, vector: Float64Array): Float64Array {
  const size = vector.length
  return vector.map((_, row) => dot(matrix.subarray(row * size, (row + 1) * size), vector))
}
