import type { CoordinateKind } from '../units'
import { COORDINATE_SYMBOLS, type FormDefinition, parameterName } from './form-definition'
import { fitWell } from './fit-well'

/**
 * U = ½ k (q − q0)² for a bond or an angle. An angle whose best θ0 lies beyond 0° or 180° is fitted with θ0 held there.
 */
export const harmonic: FormDefinition = {
  form: 'harmonic',
  kinds: ['bond', 'angle'],
  terms: null,
  formula: (kind) => `U = ½ k (${COORDINATE_SYMBOLS[kind]} − ${COORDINATE_SYMBOLS[kind]}0)²`,
  parameters: (kind) => wellParameters(kind, -2),
  freeParameters: () => 2,
  energy: ([k, centre], coordinate) => 0.5 * k * (coordinate - centre) ** 2,
  fit: (cells) => {
    const { mean, deviation } = cells
    return fitWell(cells, {
      variable: (coordinate) => (coordinate - mean) / deviation,
      coordinate: (x) => mean + deviation * x,
      slope: () => deviation,
      unit: cells.kT / deviation ** 2,
    })
  },
}

/** k and q0, k per `power` of the coordinate. */
export function wellParameters(kind: CoordinateKind, power: number) {
  return [parameterName('k', 1, power), parameterName(`${COORDINATE_SYMBOLS[kind]}0`, 0, 1)]
}
