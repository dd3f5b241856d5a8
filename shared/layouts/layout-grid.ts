import { InvalidInputError } from '../errors'
import {
  type CoordinateKind,
  coordinateFromInternal,
  coordinateToInternal,
  type CoordinateUnit,
} from '../units'
import { kindLayout, type Layout, LAYOUT_LIMITS } from './layout'
import type { TableCurve } from './table-curve'

/** Rounding by which two ends may miss each other, as a share of their distance. */
const SLACK = 1e-9

/** How a layout counts a coordinate of a kind: as written = sign · internal + shift, both in nm or rad. */
export interface Reading {
  readonly sign: 1 | -1
  readonly shift: number
}

/** The places at which a layout writes rows. */
export interface LayoutGrid {
  /** As written, ascending, in the unit of the layout. */
  readonly written: Float64Array
  /** The same places in nm or rad as the core counts them; of a dihedral in any turn. */
  readonly internal: Float64Array
  readonly reading: Reading
}

/** How a layout counts coordinates of a kind. */
export function readingOf(layout: Layout, kind: CoordinateKind): Reading {
  if (kind === 'angle' && layout.angle.reading === 'supplement') return { sign: -1, shift: Math.PI }
  // Half a turn is half a turn either way round; the range sorts out which.
  if (kind === 'dihedral' && layout.dihedral.zero === 'trans') return { sign: 1, shift: Math.PI }
  return { sign: 1, shift: 0 }
}

/**
 * Where the rows of a table stand in a layout: on the table's own coordinates, or as many rows between the limits as the layout
 * says.
 *
 * @throws {InvalidInputError} LAYOUT_INVALID with the field, when limits do not ascend, lie outside the kind's domain, or give a
 *   wrong number of rows
 */
export function layoutGrid(layout: Layout, kind: CoordinateKind, curve: TableCurve): LayoutGrid {
  const { coordinateUnit: unit, low, high, rows } = kindLayout(layout, kind)
  const reading = readingOf(layout, kind)
  const [first, last] = ownEnds(layout, kind, curve, reading)
  const ends: [number, number] = [
    low ?? coordinateFromInternal(first, unit),
    high ?? coordinateFromInternal(last, unit),
  ]
  checkEnds(layout, kind, ends, unit)
  const turn = coordinateFromInternal(2 * Math.PI, unit)
  const open = kind === 'dihedral' && !layout.dihedral.repeatEnd && ends[1] - ends[0] > turn * (1 - SLACK)
  const step = coordinateFromInternal(curve.step, unit)
  const steps = rows === null ? Math.max(1, Math.round((ends[1] - ends[0]) / step)) : rows - (open ? 0 : 1)
  const count = open ? steps : steps + 1
  if (count > LAYOUT_LIMITS.rows.high) throw tooManyRows(kind)
  const written = Float64Array.from({ length: count }, (_, row) => between(ends, row, steps))
  const internal = written.map((value) => reading.sign * (coordinateToInternal(value, unit) - reading.shift))
  return { written, internal, reading }
}

/** First and last coordinate of the table itself as the layout counts, nm or rad. */
function ownEnds(
  layout: Layout,
  kind: CoordinateKind,
  curve: TableCurve,
  reading: Reading,
): [number, number] {
  if (kind === 'dihedral' && curve.periodic) return rangeOf(layout)
  const ends = [curve.low, curve.high].map((end) => reading.sign * end + reading.shift)
  const [low, high] = [Math.min(...ends), Math.max(...ends)]
  if (kind !== 'dihedral') return [low, high]
  const [least] = rangeOf(layout)
  const turns = Math.floor((low - least) / (2 * Math.PI) + SLACK)
  return [low - turns * 2 * Math.PI, high - turns * 2 * Math.PI]
}

/** The turn in which a layout counts dihedrals, rad. */
export function rangeOf({ dihedral }: Layout): [number, number] {
  return dihedral.range === '0..360' ? [0, 2 * Math.PI] : [-Math.PI, Math.PI]
}

/** Evenly spaced without the sum of rounding of a step; 0 is 0. */
function between([low, high]: readonly [number, number], row: number, steps: number): number {
  const value = (low * (steps - row) + high * row) / steps
  return Math.abs(value) < SLACK * 1e-4 * (high - low) ? 0 : value
}

function checkEnds(
  layout: Layout,
  kind: CoordinateKind,
  [low, high]: readonly [number, number],
  unit: CoordinateUnit,
): void {
  const [least, most] = kind === 'bond' ? [0, Infinity] : kind === 'angle' ? [0, Math.PI] : rangeOf(layout)
  const slack = SLACK * Math.max(1, Math.abs(high))
  const [from, to] = [least, most].map((end) => coordinateFromInternal(end, unit))
  if (!(low >= from - slack) || (kind === 'bond' && low <= 0)) {
    throw refuse(
      `${kind}.low`,
      kind === 'bond' ? 'A table of a bond starts above 0.' : outside(kind, from, to),
    )
  }
  if (!(high <= to + slack)) throw refuse(`${kind}.high`, outside(kind, from, to))
  if (!(low < high)) throw refuse(`${kind}.high`, 'A table ends above its start.')
}

function outside(kind: CoordinateKind, from: number, to: number): string {
  return `As this layout counts, a table of a${kind === 'angle' ? 'n' : ''} ${kind} lies in one piece between ${Number(from.toPrecision(6))} and ${Number(to.toPrecision(6))}.`
}

function tooManyRows(kind: CoordinateKind): InvalidInputError {
  return refuse(`${kind}.rows`, `That gives more than ${LAYOUT_LIMITS.rows.high} rows.`)
}

function refuse(field: string, message: string): InvalidInputError {
  return new InvalidInputError('LAYOUT_INVALID', message, { field })
}
