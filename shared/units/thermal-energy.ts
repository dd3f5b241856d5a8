import { InvalidInputError } from '../errors'
import { GAS_CONSTANT } from './constants'

/**
 * Thermal energy kT per mole, the scale of every Boltzmann inversion.
 *
 * @param temperature in K, above 0 and finite
 * @returns R·T in kJ/mol
 * @throws {InvalidInputError} TEMPERATURE_INVALID for zero, negative, NaN or infinite temperatures
 * @example thermalEnergy(300) // 2.49433878545…
 */
export function thermalEnergy(temperature: number): number {
  if (!(temperature > 0 && Number.isFinite(temperature))) {
    throw new InvalidInputError(
      'TEMPERATURE_INVALID',
      `The temperature must be a number above 0 K, but it is ${temperature}.`,
      { field: 'temperature' },
    )
  }
  return GAS_CONSTANT * temperature
}
