import type { Shape } from './likelihood'
import type { LikelihoodCells } from './likelihood-cells'

/**
 * η = ln Σ exp[a_n − ln s_n − (x − c_n)²/(2s_n²)] in x = (q − mean)/deviation, a_1 = 0. β holds the centres c, then ln s, then
 * a_2 … a_M.
 */
export function gaussianShape({ points, mean, deviation }: LikelihoodCells, terms: number): Shape {
  const size = 3 * terms - 1
  const exponents = new Float64Array(terms)
  const inverse = new Float64Array(terms)
  const heights = new Float64Array(terms)
  return {
    size,
    fill: (beta, eta, gradient) => {
      for (let n = 0; n < terms; n++) {
        inverse[n] = Math.exp(-beta[terms + n])
        heights[n] = (n === 0 ? 0 : beta[2 * terms + n - 1]) - beta[terms + n]
      }
      for (let p = 0; p < points.length; p++) {
        const x = (points[p] - mean) / deviation
        let top = -Infinity
        for (let n = 0; n < terms; n++) {
          const d = (x - beta[n]) * inverse[n]
          exponents[n] = heights[n] - 0.5 * d * d
          if (exponents[n] > top) top = exponents[n]
        }
        let sum = 0
        for (let n = 0; n < terms; n++) {
          exponents[n] = Math.exp(exponents[n] - top)
          sum += exponents[n]
        }
        eta[p] = top + Math.log(sum)
        const start = p * size
        for (let n = 0; n < terms; n++) {
          const share = exponents[n] / sum
          const d = (x - beta[n]) * inverse[n]
          gradient[start + n] = share * d * inverse[n]
          gradient[start + terms + n] = share * (d * d - 1)
          if (n > 0) gradient[start + 2 * terms + n - 1] = share
        }
      }
    },
  }
}
