import { InvalidInputError } from '../errors'
import type { Table } from '../tables'
import { coordinateFromInternal, energyScale, unitWord } from '../units'
import type { CheckedFile } from './checked-file'
import { unitWords } from './column-names'
import { forceChecks } from './force-checks'
import { kindLayout, type Layout } from './layout'
import { layoutCells } from './layout-cells'
import { type LayoutCheck, shortNumber as short } from './layout-check'
import { rangeOf } from './layout-grid'
import { layoutValues } from './layout-values'
import { printedNumbers } from './printed-numbers'
import { resampledCheck } from './resampled-check'
import { type BeyondTable, tableCurve } from './table-curve'
import { writtenQuantities } from './written-quantities'

/** What two ends of a turn may differ by, in kT or kT per radian. */
const ENDS_APART = 1e-6

/**
 * Looks through the file that a layout makes of a table, at the numbers as they are printed. A check that does not apply, such as
 * that of a force which is not written, is left out.
 *
 * @param beyond as in `writeLayout`
 * @returns checks in a fixed order
 * @throws {InvalidInputError} as `writeLayout`
 */
export function layoutChecks(table: Table, layout: Layout, beyond: BeyondTable | null = null): LayoutCheck[] {
  const values = layoutValues(table, layout, beyond)
  const cells = layoutCells(layout, values)
  const { coordinates } = values
  const last = coordinates.length - 1
  if (last < 1)
    throw new InvalidInputError('LAYOUT_INVALID', 'A table has at least two rows.', { field: 'rows' })
  const step = (coordinates[last] - coordinates[0]) / last
  const file: CheckedFile = {
    table,
    layout,
    values,
    cells,
    printed: printedNumbers(table, layout, cells, step),
  }
  return [
    rowsCheck(file),
    distinctCheck(file),
    domainCheck(file),
    ...forceChecks(file),
    periodicCheck(file),
    forceUnitCheck(file),
    widthCheck(file),
    resampledCheck(file, beyond),
  ].filter((check) => check !== null)
}

function rowsCheck({ printed: { coordinates, step }, layout, table }: CheckedFile): LayoutCheck {
  const unit = unitWords(layout, table.kind).coordinate
  let worst = 0
  for (let row = 1; row < coordinates.length; row++) {
    worst = Math.max(worst, Math.abs(coordinates[row] - coordinates[row - 1] - step))
  }
  // Engines that find a row by dividing land in the wrong one when a step is off by a percent over many rows.
  const ok = worst <= 0.01 * step
  return {
    code: 'ROWS_EVEN',
    ok,
    message: ok
      ? `${coordinates.length} rows, ${short(step)} ${unit} apart.`
      : `Steps differ by up to ${short(worst)} ${unit} at a step of ${short(step)}, from rounding. Give the coordinate more digits.`,
  }
}

function distinctCheck({ printed: { coordinates }, layout }: CheckedFile): LayoutCheck | null {
  if (!writtenQuantities(layout).includes('coordinate')) return null
  const twice = coordinates.findIndex((value, row) => row > 0 && value <= coordinates[row - 1])
  return {
    code: 'COORDINATES_DISTINCT',
    ok: twice === -1,
    message:
      twice === -1
        ? 'No two rows print the same coordinate.'
        : `Rows ${twice} and ${twice + 1} print the same coordinate, ${short(coordinates[twice])}. Give it more digits.`,
  }
}

function domainCheck({ table, layout, values: { coordinates } }: CheckedFile): LayoutCheck {
  const { kind } = table
  const { coordinateUnit } = kindLayout(layout, kind)
  const last = coordinates.length - 1
  const step = (coordinates[last] - coordinates[0]) / last
  const whole =
    kind === 'bond'
      ? [table.coordinates[0], table.coordinates[table.coordinates.length - 1]]
      : kind === 'angle'
        ? [0, Math.PI]
        : rangeOf(layout)
  const [low, high] = whole.map((end) => coordinateFromInternal(end, coordinateUnit))
  const missingEnd = kind === 'dihedral' && !layout.dihedral.repeatEnd ? step : 0
  const slack = 1e-6 * step
  const ok = coordinates[0] <= low + slack && coordinates[last] >= high - missingEnd - slack
  const range = `${short(coordinates[0])} to ${short(coordinates[last])} ${unitWord(coordinateUnit)}`
  const what =
    kind === 'bond'
      ? `the table reaches from ${short(low)} to ${short(high)}`
      : `the whole is ${short(low)} to ${short(high)}`
  return {
    code: 'DOMAIN_COVERED',
    ok,
    message: ok
      ? `The rows reach from ${range}.`
      : `The rows reach from ${range}, but ${what}. A simulation that leaves the rows stops or reads nonsense.`,
  }
}

/** A turn is written out of one row for both its ends, so it is the table whose ends may differ. */
function periodicCheck({ table, layout }: CheckedFile): LayoutCheck | null {
  if (table.kind !== 'dihedral' || !tableCurve(table).periodic) return null
  const { energies, forces, temperature } = table
  const last = energies.length - 1
  const kT = energyScale('kT', temperature)
  const apart = kT * Math.max(Math.abs(energies[last] - energies[0]), Math.abs(forces[last] - forces[0]))
  const ok = apart < ENDS_APART
  const closing = layout.dihedral.repeatEnd
    ? 'Both ends of the turn have the same energy and force.'
    : 'The last row stands one step before the turn is full; the first row closes it.'
  return {
    code: 'PERIODIC_ENDS',
    ok,
    message: ok ? closing : `Both ends of the turn are one place, but differ by ${short(apart, 2)} kT.`,
  }
}

function forceUnitCheck({ table, layout }: CheckedFile): LayoutCheck | null {
  const written = writtenQuantities(layout)
  if (!written.includes('force') && !written.includes('derivative')) return null
  const { coordinateUnit, energyUnit, force } = kindLayout(layout, table.kind)
  if (force.per === coordinateUnit && force.energyUnit === energyUnit) return null
  const words = unitWords(layout, table.kind)
  return {
    code: 'FORCE_UNIT_DIFFERS',
    ok: false,
    message: `The force is in ${words.force}, beside ${words.energy} and ${words.coordinate} in the other columns. Keep that only if the program that reads it asks for it.`,
  }
}

function widthCheck({ layout, cells }: CheckedFile): LayoutCheck | null {
  if (layout.writing !== 'columns') return null
  const { numbers } = layout
  const tooWide = layout.columns.find((quantity) => {
    const { width } = numbers[quantity === 'derivative' ? 'force' : quantity]
    return width > 0 && cells[quantity].some((cell) => cell.length > width)
  })
  if (layout.columns.every((quantity) => numbers[quantity === 'derivative' ? 'force' : quantity].width === 0))
    return null
  return {
    code: 'CELLS_FIT',
    ok: tooWide === undefined,
    message:
      tooWide === undefined
        ? 'Every number fits its column.'
        : `Some numbers of the column “${tooWide}” are wider than it. Programs that count characters read them wrongly.`,
  }
}
