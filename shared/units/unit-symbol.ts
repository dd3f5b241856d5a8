import type { CoordinateUnit } from './coordinate-units'
import type { EnergyUnit } from './energy-units'

const SYMBOLS: Record<CoordinateUnit | EnergyUnit, string> = {
  nm: 'nm',
  angstrom: 'Å',
  degree: '°',
  radian: 'rad',
  'kJ/mol': 'kJ/mol',
  'kcal/mol': 'kcal/mol',
  kT: 'kT',
}

/**
 * Symbol of a unit as it stands on screen.
 *
 * @example unitSymbol('degree') // '°'
 */
export function unitSymbol(unit: CoordinateUnit | EnergyUnit): string {
  return SYMBOLS[unit]
}

/**
 * Symbol of a unit as it stands in a text file, where plain letters read everywhere: 'deg' for degree, 'angstrom' for Å.
 *
 * @example unitWord('degree') // 'deg'
 */
export function unitWord(unit: CoordinateUnit | EnergyUnit): string {
  if (unit === 'degree') return 'deg'
  return unit === 'angstrom' ? 'angstrom' : SYMBOLS[unit]
}
