import { unitWord } from '../units'
import { formatNumber } from './format-number'
import type { Table, TableRow, TableUnits } from './table'
import { tableRows } from './table-rows'

const COLUMN_WIDTH = 15

/**
 * A table as text: comment lines, one line that names the columns with their units, then the rows. Numbers are right-
 * aligned and separated by blanks; every line ends with a newline.
 *
 * @param commentLines without the leading '# '; see `tableComments`
 * @throws {InvalidInputError} TEMPERATURE_INVALID when energies are asked for in kT of no valid temperature
 */
export function formatTable(table: Table, units: TableUnits, commentLines: readonly string[]): string {
  const comments = [...commentLines, '', columnNames(units)].map((line) => `# ${line}`.trimEnd())
  return `${comments.join('\n')}\n${formatRows(table, units)}`
}

/**
 * The rows of a table as text, without comments: what the checksum of a file is taken over.
 *
 * @returns one line per row, each ending with a newline
 */
export function formatRows(table: Table, units: TableUnits): string {
  return tableRows(table, units).map(formatRow).join('')
}

function formatRow({ coordinate, energy, force }: TableRow): string {
  const cells = [coordinate, energy, force].map((value) => formatNumber(value).padStart(COLUMN_WIDTH))
  return `${cells.join(' ')}\n`
}

function columnNames({ coordinateUnit, energyUnit }: TableUnits): string {
  const [length, energy] = [unitWord(coordinateUnit), unitWord(energyUnit)]
  const names = [`coordinate[${length}]`, `energy[${energy}]`, `force[${energy}/${length}]`]
  // The comment sign takes two places of the first column.
  return names.map((name, column) => name.padStart(COLUMN_WIDTH - (column === 0 ? 2 : 0))).join(' ')
}
