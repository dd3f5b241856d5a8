import type { FormDefinition } from './form-definition'
import { fitWell } from './fit-well'
import { wellParameters } from './harmonic'

/**
 * U = ½ k (cos θ − cos θ0)² for an angle; its force vanishes at 180°. Where the best cos θ0 lies beyond ±1, θ0 is held at 0°
 * or 180°.
 */
export const cosineHarmonic: FormDefinition = {
  form: 'cosine-harmonic',
  kinds: ['angle'],
  terms: null,
  formula: () => 'U = ½ k (cos θ − cos θ0)²',
  parameters: (kind) => wellParameters(kind, 0),
  freeParameters: () => 2,
  energy: ([k, centre], coordinate) => 0.5 * k * (Math.cos(coordinate) - Math.cos(centre)) ** 2,
  fit: (cells) =>
    fitWell(cells, {
      variable: Math.cos,
      coordinate: Math.acos,
      slope: (cosine) => -1 / Math.sqrt(1 - cosine * cosine),
      unit: cells.kT,
    }),
}
