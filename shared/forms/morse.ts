import { type FormDefinition, parameterName } from './form-definition'
import type { Shape } from './likelihood'
import type { LikelihoodCells } from './likelihood-cells'
import { RefusedForm } from './refused-form'
import { solveForm } from './solve-form'

/** Largest exponent: beyond it the wall is higher than any number of kT that matters, and squares stay finite. */
const HIGHEST_EXPONENT = 300
/** Below this |a x| the series of the derivative is exact to rounding. */
const SERIES_BELOW = 1e-3
/** a of the start, in deviations; the softening of a typical bond. */
const START_STEEPNESS = 0.3

/**
 * U = D [1 − exp(−a (r − r0))]² for a bond. Fitted in ln k with k = 2Da², in a, which may pass through 0 on the way (the
 * harmonic form), and in r0; refused unless a > 0 in the end. Not confining: it is normalised over the region of the
 * likelihood as every other form is, and a table continues it by a tail.
 */
export const morse: FormDefinition = {
  form: 'morse',
  kinds: ['bond'],
  terms: null,
  formula: () => 'U = D [1 − exp(−a (r − r0))]²',
  parameters: () => [parameterName('D', 1, 0), parameterName('a', 0, -1), parameterName('r0', 0, 1)],
  freeParameters: () => 3,
  energy: ([depth, a, centre], coordinate) =>
    depth * Math.expm1(Math.min(HIGHEST_EXPONENT, -a * (coordinate - centre))) ** 2,
  fit: (cells) => {
    const { kT, mean, deviation } = cells
    return solveForm(cells, morseShape(cells), [0, START_STEEPNESS, 0], ([logStiffness, a, x]) => {
      if (!(a > 0)) {
        throw new RefusedForm(
          'DEGENERATE',
          'The bond is not softer outwards than inwards: no finite D is best, and the harmonic form says the same.',
        )
      }
      const centre = mean + deviation * x
      if (!(centre > 0)) throw new RefusedForm('OUTSIDE_DOMAIN', 'The best r0 is not above 0.')
      return [(kT * Math.exp(logStiffness)) / (2 * a * a), a / deviation, centre]
    })
  },
}

/** η = −½ k g² with g = (1 − exp(−a d))/a, d = x − x0; β is ln k, a, x0. */
export function morseShape({ points, mean, deviation }: LikelihoodCells): Shape {
  return {
    size: 3,
    fill: ([logStiffness, a, centre], eta, gradient) => {
      const k = Math.exp(logStiffness)
      for (let p = 0; p < points.length; p++) {
        const d = (points[p] - mean) / deviation - centre
        const t = Math.min(HIGHEST_EXPONENT, -a * d)
        const decay = Math.exp(t)
        const small = Math.abs(t) < SERIES_BELOW
        // g → d and dg/da → −d²/2 as a → 0, where the closed forms lose their digits.
        const g = small ? d * (1 + t * (1 / 2 + t * (1 / 6 + t / 24))) : -Math.expm1(t) / a
        const slope = small ? -d * d * (1 / 2 + t * (1 / 3 + t / 8)) : (d * decay - g) / a
        eta[p] = -0.5 * k * g * g
        gradient[3 * p] = eta[p]
        gradient[3 * p + 1] = -k * g * slope
        gradient[3 * p + 2] = k * g * decay
      }
    },
  }
}
