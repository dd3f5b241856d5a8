import type { Shape } from './likelihood'

/**
 * A shape that is linear in β: η = Σ β_j f_j(q), an exponential family, whose likelihood has one maximum.
 *
 * @param points where the features are wanted, nm or rad
 * @param features f_j
 */
export function linearShape(
  points: Float64Array,
  features: readonly ((coordinate: number) => number)[],
): Shape {
  const size = features.length
  const values = new Float64Array(points.length * size)
  points.forEach((point, p) => features.forEach((feature, j) => (values[p * size + j] = feature(point))))
  return {
    size,
    fill: (beta, eta, gradient) => {
      gradient.set(values)
      for (let p = 0; p < eta.length; p++) {
        let sum = 0
        for (let j = 0; j < size; j++) sum += beta[j] * values[p * size + j]
        eta[p] = sum
      }
    },
  }
}
