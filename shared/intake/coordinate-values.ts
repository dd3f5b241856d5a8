import { InvalidInputError } from '../errors'
import type { CoordinateKind } from '../histogram/histogram'
import { coordinateFromInternal, coordinateToInternal, unitSymbol } from '../units'
import type { CoordinateUnit } from '../units'

/** What a coordinate of the file is: it decides whether zero is a value or an error. */
export type CoordinateRole = 'centre' | 'edge' | 'sample'

/** Coordinates of a file in the file's unit, and where they stand. */
export interface FileCoordinates {
  readonly values: Float64Array
  readonly lines: Int32Array
  /** Column in the file, counted from 0. */
  readonly column: number
  readonly kind: CoordinateKind
  readonly unit: CoordinateUnit
}

/** A bare number for a message: six significant digits, no trailing zeros. */
export function shortNumber(value: number): string {
  return String(Number(value.toPrecision(6)))
}

/** A coordinate for a message, from the internal unit to the file's. */
export function shortCoordinate(value: number, unit: CoordinateUnit): string {
  return `${shortNumber(coordinateFromInternal(value, unit))} ${unitSymbol(unit)}`
}

/**
 * Coordinates of a file in internal units, checked against the domain of their kind. Radians printed as a rounded
 * multiple of π, and any angle within 1e-9 rad of one, are that multiple: 3.1416 is straight and not beyond it. A dihedral may be
 * given in −180…180° or in 0…360°, not in both; it is not folded here.
 *
 * @throws {InvalidInputError} BOND_NOT_POSITIVE: below zero, or at zero for a sample; ANGLE_OUT_OF_RANGE;
 *   DIHEDRAL_OUT_OF_RANGE; each with line and column of the first offender
 */
export function coordinateValues(coordinates: FileCoordinates, role: CoordinateRole): Float64Array {
  const { values, kind, unit } = coordinates
  if (kind === 'bond') checkBonds(coordinates, role)
  const internal = values.map((value) => coordinateToInternal(value, unit))
  if (kind !== 'bond') internal.forEach((value, index) => (internal[index] = onTurn(value, unit)))
  if (kind === 'angle') checkAngles(coordinates, internal)
  if (kind === 'dihedral') checkDihedrals(coordinates, internal)
  return internal
}

function checkBonds(coordinates: FileCoordinates, role: CoordinateRole): void {
  const bad = coordinates.values.findIndex((value) => value < 0 || (value === 0 && role === 'sample'))
  if (bad < 0) return
  throw outside('BOND_NOT_POSITIVE', coordinates, bad, 'a bond length is above zero')
}

function checkAngles(coordinates: FileCoordinates, internal: Float64Array): void {
  const bad = internal.findIndex((value) => value < 0 || value > Math.PI)
  if (bad < 0) return
  const domain = coordinates.unit === 'degree' ? '0 to 180°' : '0 to π rad'
  const hint = mixedUpUnit(coordinates, Math.abs(internal[bad]) > 2 * Math.PI)
  throw outside('ANGLE_OUT_OF_RANGE', coordinates, bad, `an angle lies within ${domain}${hint}`)
}

function checkDihedrals(coordinates: FileCoordinates, internal: Float64Array): void {
  const signed = internal.some((value) => value < 0)
  const [low, high] = signed ? [-Math.PI, Math.PI] : [0, 2 * Math.PI]
  const bad = internal.findIndex((value) => value < low || value > high)
  if (bad < 0) return
  const turns = coordinates.unit === 'degree' ? ['−180 to 180°', '0 to 360°'] : ['−π to π rad', '0 to 2π rad']
  const hint = mixedUpUnit(coordinates, Math.abs(internal[bad]) > 4 * Math.PI)
  const turn = signed ? `with negative values in the file the turn is ${turns[0]}` : `the turn is ${turns[1]}`
  throw outside('DIHEDRAL_OUT_OF_RANGE', coordinates, bad, `${turn}${hint}`)
}

function mixedUpUnit({ unit }: FileCoordinates, farOut: boolean): string {
  return unit === 'radian' && farOut ? '; is the file in degrees' : ''
}

function outside(
  code: 'BOND_NOT_POSITIVE' | 'ANGLE_OUT_OF_RANGE' | 'DIHEDRAL_OUT_OF_RANGE',
  { values, lines, column, unit }: FileCoordinates,
  index: number,
  why: string,
): InvalidInputError {
  const end = why.includes('; is ') ? '?' : '.'
  return new InvalidInputError(
    code,
    `Line ${lines[index]}, column ${column + 1}: ${values[index]} ${unitSymbol(unit)}, but ${why}${end}`,
    { line: lines[index], column: column + 1 },
  )
}

/** Multiples of π that are ends of a domain. */
const TURN_ENDS = [-Math.PI, 0, Math.PI, 2 * Math.PI]
/** What the arithmetic of the program that wrote the file leaves behind, rad. */
const ROUNDING = 1e-9

/** −π, π and 2π as they look after rounding to 2 … 12 decimals, with the exact value. */
const PRINTED_TURNS = new Map<number, number>()
for (const exact of [-Math.PI, Math.PI, 2 * Math.PI]) {
  for (let decimals = 2; decimals <= 12; decimals++) PRINTED_TURNS.set(Number(exact.toFixed(decimals)), exact)
}

/** The end of a domain that a value stands for, or the value itself. */
function onTurn(value: number, unit: CoordinateUnit): number {
  const end = TURN_ENDS.find((each) => Math.abs(value - each) < ROUNDING)
  return end ?? (unit === 'radian' ? PRINTED_TURNS.get(value) : undefined) ?? value
}
