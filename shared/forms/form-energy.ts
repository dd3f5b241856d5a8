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
export function formEnergy(fit: FormFit, coordinate: number): number {
  return energyOf(fit)(coordinate)
}

/** `formEnergy` as a function of the coordinate alone, for many of them. */
export function energyOf({ form, parameters, temperature }: FormFit): (coordinate: number) => number {
  const values = parameters.map(({ value }) => value)
  const kT = thermalEnergy(temperature)
  const { energy } = FORM_DEFINITIONS[form]
  return (coordinate) => energy(values, coordinate, kT)
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
  const values = parameters.map(({ value }) => value)
  // Row after row: how U(q) − U(q0) changes with each parameter.
  const slopes = new Float64Array(coordinates.length * size)
  parameters.forEach(({ standardError }, j) => {
    const step = STEP * (standardError ?? 0)
    if (!(step > 0)) return
    const [below, above] = [-step, step].map((shift) =>
      values.map((value, other) => (other === j ? value + shift : value)),
    )
    const slope = (q: number) => (energy(above, q, kT) - energy(below, q, kT)) / (2 * step)
    const fixed = slope(origin)
    for (let row = 0; row < coordinates.length; row++)
      slopes[row * size + j] = slope(coordinates[row]) - fixed
  })
  return coordinates.map((_, row) => {
    let variance = 0
    for (let j = 0; j < size; j++) {
      for (let k = 0; k < size; k++)
        variance += slopes[row * size + j] * covariance[j * size + k] * slopes[row * size + k]
    }
    return Math.sqrt(Math.max(0, variance))
  })
}
