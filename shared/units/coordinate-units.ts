import { ANGSTROMS_PER_NANOMETRE, DEGREES_PER_RADIAN } from './constants'
import type { CoordinateKind } from './coordinate-kind'

export type LengthUnit = 'nm' | 'angstrom'
export type AngleUnit = 'degree' | 'radian'
export type CoordinateUnit = LengthUnit | AngleUnit

const UNITS_PER_INTERNAL: Record<CoordinateUnit, number> = {
  nm: 1,
  angstrom: ANGSTROMS_PER_NANOMETRE,
  degree: DEGREES_PER_RADIAN,
  radian: 1,
}

/**
 * Units a coordinate of this kind may be given and shown in; the first is what the product proposes.
 *
 * @example unitsOfKind('bond') // ['nm', 'angstrom']
 */
export function unitsOfKind(kind: CoordinateKind): readonly CoordinateUnit[] {
  return kind === 'bond' ? ['nm', 'angstrom'] : ['degree', 'radian']
}

/**
 * Size of one unit in internal units (nm, rad): internal = value · scale.
 *
 * @example coordinateScale('angstrom') // 0.1
 */
export function coordinateScale(unit: CoordinateUnit): number {
  return 1 / UNITS_PER_INTERNAL[unit]
}

/**
 * Converts a coordinate from a user's unit to nm or rad. Divides by the units per nm or rad, so that 180° is π and
 * 3.5 Å is 0.35 nm to the last digit. NaN and infinity pass through.
 *
 * @example coordinateToInternal(180, 'degree') // Math.PI
 */
export function coordinateToInternal(value: number, unit: CoordinateUnit): number {
  return value / UNITS_PER_INTERNAL[unit]
}

/**
 * Converts a coordinate from nm or rad to a user's unit. NaN and infinity pass through.
 *
 * @example coordinateFromInternal(0.35, 'angstrom') // 3.5
 */
export function coordinateFromInternal(value: number, unit: CoordinateUnit): number {
  return value * UNITS_PER_INTERNAL[unit]
}
