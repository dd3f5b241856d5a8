import { coordinateDomain } from '../histogram'
import { COORDINATE_SYMBOLS, type FormDefinition, parameterName } from './form-definition'
import { wellParameters } from './harmonic'
import type { LikelihoodCells } from './likelihood-cells'
import { linearShape } from './linear-shape'
import { RefusedForm } from './refused-form'
import { solveForm } from './solve-form'

const SCANNED = 400
const NEWTON_STEPS = 30

/**
 * U = ½ k (q − q0)² + k3 (q − q0)³ + k4 (q − q0)⁴ for a bond or an angle, about its deepest well q0 inside the domain.
 * Fitted as a polynomial of fourth degree in x = (q − mean)/deviation; refused unless k4 > 0, since the curve would turn
 * down outwards.
 */
export const quartic: FormDefinition = {
  form: 'quartic',
  kinds: ['bond', 'angle'],
  terms: null,
  formula: (kind) => {
    const step = `(${COORDINATE_SYMBOLS[kind]} − ${COORDINATE_SYMBOLS[kind]}0)`
    return `U = ½ k ${step}² + k3 ${step}³ + k4 ${step}⁴`
  },
  parameters: (kind) => [...wellParameters(kind, -2), parameterName('k3', 1, -3), parameterName('k4', 1, -4)],
  freeParameters: () => 4,
  energy: ([k, centre, k3, k4], coordinate) => {
    const d = coordinate - centre
    return d * d * (0.5 * k + d * (k3 + d * k4))
  },
  fit: (cells) => {
    const { mean, deviation, points } = cells
    const x = (q: number) => (q - mean) / deviation
    const features = [1, 2, 3, 4].map((power) => (q: number) => x(q) ** power)
    return solveForm(cells, linearShape(points, features), [0, -0.5, 0, 0], (beta) =>
      aboutDeepestWell(beta, cells),
    )
  },
}

/** From −η = Σ c_n xⁿ to k, q0, k3, k4. */
function aboutDeepestWell(beta: Float64Array, cells: LikelihoodCells): number[] {
  const { kT, mean, deviation } = cells
  const [c1, c2, c3, c4] = beta.map((value) => -value)
  if (!(c4 > 0)) {
    throw new RefusedForm(
      'UNBOUNDED',
      'The best k4 is not above 0: the curve would turn down outwards and hold no chain together.',
    )
  }
  const x = deepestWell([c1, c2, c3, c4], searchedRange(cells))
  if (x === null) throw new RefusedForm('OUTSIDE_DOMAIN', 'The curve has no well inside the domain.')
  return [
    (kT * (2 * c2 + 6 * c3 * x + 12 * c4 * x * x)) / deviation ** 2,
    mean + deviation * x,
    (kT * (c3 + 4 * c4 * x)) / deviation ** 3,
    (kT * c4) / deviation ** 4,
  ]
}

/** The domain in x; of a bond, the region of the likelihood. */
function searchedRange({ kind, region, mean, deviation }: LikelihoodCells): [number, number] {
  const [low, high] = kind === 'bond' ? region : coordinateDomain(kind)
  return [(low - mean) / deviation, (high - mean) / deviation]
}

/** The lowest local minimum of Σ c_n xⁿ: scanned, then refined by Newton's method, which keeps it smooth in c. */
function deepestWell([c1, c2, c3, c4]: readonly number[], [low, high]: [number, number]): number | null {
  const value = (x: number) => x * (c1 + x * (c2 + x * (c3 + x * c4)))
  const at = (index: number) => low + ((high - low) * index) / SCANNED
  let best: number | null = null
  for (let index = 1; index < SCANNED; index++) {
    const here = value(at(index))
    if (here > value(at(index - 1)) || here > value(at(index + 1))) continue
    if (best === null || here < value(best)) best = at(index)
  }
  if (best === null) return null
  for (let step = 0; step < NEWTON_STEPS; step++) {
    const slope = c1 + best * (2 * c2 + best * (3 * c3 + best * 4 * c4))
    best -= slope / (2 * c2 + best * (6 * c3 + best * 12 * c4))
  }
  return best
}
