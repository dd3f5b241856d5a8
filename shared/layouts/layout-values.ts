import { InvalidInputError } from '../errors'
import { largestMagnitude } from '../numeric'
import type { Table } from '../tables'
import { type CoordinateKind, coordinateScale, energyScale } from '../units'
import { kindLayout, type Layout } from './layout'
import { type LayoutGrid, layoutGrid } from './layout-grid'
import { type BeyondTable, type TableCurve, tableCurve } from './table-curve'

/** Energies and forces this much smaller than the largest of their column are rounding and become 0. */
const ROUNDING = 1e-13

/** The numbers of a table in the units and the order of a layout, before they are rounded to its digits. */
export interface LayoutValues {
  readonly coordinates: Float64Array
  readonly energies: Float64Array
  /** −dU/d(coordinate as written). */
  readonly forces: Float64Array
  /** Where the rows stand, nm or rad as the core counts. */
  readonly internal: Float64Array
}

/**
 * Reads a table at the rows of a layout and puts the numbers into its units, in its sense and order.
 *
 * @param beyond what holds outside the table; without it limits beyond the table are refused
 * @throws {InvalidInputError} LAYOUT_BEYOND_TABLE with the field; LAYOUT_INVALID as `layoutGrid`; TEMPERATURE_INVALID
 */
export function layoutValues(table: Table, layout: Layout, beyond: BeyondTable | null = null): LayoutValues {
  const { kind, temperature } = table
  const { energyUnit, force } = kindLayout(layout, kind)
  const curve = tableCurve(table)
  const grid = layoutGrid(layout, kind, curve)
  checkReach(kind, grid, curve, beyond)
  const energies = new Float64Array(grid.internal.length)
  const forces = new Float64Array(grid.internal.length)
  grid.internal.forEach((coordinate, row) => {
    const point = beyond === null || curve.covers(coordinate) ? curve.at(coordinate) : beyond(coordinate)
    energies[row] = point.energy
    forces[row] = point.force
  })
  return {
    coordinates: grid.written,
    internal: grid.internal,
    energies: scaled(energies, energyScale(energyUnit, temperature)),
    forces: scaled(
      forces,
      grid.reading.sign * energyScale(force.energyUnit, temperature) * coordinateScale(force.per),
    ),
  }
}

/** Numbers times a factor, those that are only rounding beside the largest as 0. */
export function scaled(values: Float64Array, factor: number): Float64Array {
  const least = ROUNDING * largestMagnitude(values)
  return values.map((value) => (Math.abs(value) < least ? 0 : value * factor))
}

function checkReach(
  kind: CoordinateKind,
  { internal, written, reading }: LayoutGrid,
  curve: TableCurve,
  beyond: BeyondTable | null,
): void {
  if (beyond !== null) return
  const row = [0, internal.length - 1].find((end) => !curve.covers(internal[end]))
  if (row === undefined) return
  const end = row === 0 ? 'low' : 'high'
  throw new InvalidInputError(
    'LAYOUT_BEYOND_TABLE',
    `The layout ${row === 0 ? 'starts' : 'ends'} at ${Number(written[row].toPrecision(6))}, where this table${reading.sign < 0 ? ', counted that way,' : ''} has no rows.`,
    { field: `${kind}.${end}` },
  )
}
