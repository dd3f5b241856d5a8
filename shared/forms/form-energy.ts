import { thermalEnergy } from '../units'
import type { FormFit } from './form'
import { FORM_DEFINITIONS } from './form-definitions'

/** Step of the derivative along a parameter, in its standard errors. */
const STEP = 1e-3

/**
 * Energy of a fitted form, straight from its formula and parameters.
 *
 * @param coordinate nm or rad, in the domain of the kind
 * @returns kJ/mol up to the constant of the formula; finite
 */
export function formEnergy({ form, parameters, temperature }: FormFit, coordinate: number): number {
  const values = parameters.map(({ value }) => value)
  return FORM_DEFINITIONS[form].energy(values, coordinate, thermalEnergy(temperature))
}

/**
 * Standard deviations of U(q) − U(q0) of a fitted form by the delta method.
 *
 * @param coordinates nm or rad
 * @param origin q0
 * @returns kJ/mol; null when the number of independent samples is unknown
 */
export function formDeviations(
  { form, parameters, temperature, covariance }: FormFit,
  coordinates: Float64Array,
  origin: number,
): Float64Array | null {
  if (covariance === null) return null
  const kT = thermalEnergy(temperature)
  const { energy } = FORM_DEFINITIONS[form]
  const size = parameters.length
  const moved = parameters.map(({ standardError }, index) => {
    const step = STEP * (standardError ?? 0)
    const [below, above] = [-step, step].map((shift) =>
      parameters.map(({ value }, other) => (other === index ? value + shift : value)),
    )
    return { below, above, width: 2 * step }
  })
  const slopes = (coordinate: number) =>
    moved.map(({ below, above, width }) =>
      width > 0 ? (energy(above, coordinate, kT) - energy(below, coordinate, kT)) / width : 0,
    )
  const fixed = slopes(origin)
  return coordinates.map((coordinate) => {
    const change = slopes(coordinate).map((slope, index) => slope - fixed[index])
    let variance = 0
    for (let j = 0; j < size; j++) {
      for (let k = 0; k < size; k++) variance += change[j] * covariance[j * size + k] * change[k]
    }
    return Math.sqrt(Math.max(0, variance))
  })
}
