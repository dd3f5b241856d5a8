import { KILOJOULES_PER_KILOCALORIE } from './constants'
import { thermalEnergy } from './thermal-energy'

export type EnergyUnit = 'kJ/mol' | 'kcal/mol' | 'kT'

/** Energy units the product offers, in the order it shows them. */
export const ENERGY_UNITS: readonly EnergyUnit[] = ['kJ/mol', 'kcal/mol', 'kT']

/**
 * Factor from kJ/mol to a user's energy unit: user = internal · scale.
 *
 * @param temperature in K; used for kT only
 * @throws {InvalidInputError} TEMPERATURE_INVALID when the unit is kT and the temperature is not above 0
 * @example energyScale('kcal/mol', 300) // 1 / 4.184
 */
export function energyScale(unit: EnergyUnit, temperature: number): number {
  if (unit === 'kJ/mol') return 1
  return unit === 'kcal/mol' ? 1 / KILOJOULES_PER_KILOCALORIE : 1 / thermalEnergy(temperature)
}

/**
 * Converts an energy from kJ/mol to a user's unit. NaN and infinity pass through.
 *
 * @param temperature in K; used for kT only
 * @throws {InvalidInputError} TEMPERATURE_INVALID when the unit is kT and the temperature is not above 0
 * @example energyFromInternal(4.184, 'kcal/mol', 300) // 1
 */
export function energyFromInternal(value: number, unit: EnergyUnit, temperature: number): number {
  return value * energyScale(unit, temperature)
}
