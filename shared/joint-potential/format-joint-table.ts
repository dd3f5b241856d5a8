import { formatNumber } from '../tables'
import { unitWord } from '../units'
import { type JointTable, type JointTableRow, jointTableRows, type JointTableUnits } from './joint-table'

const COLUMN_WIDTH = 15

/**
 * A joint table as text: comment lines, one line that names the columns with their units, then the rows, with a blank line
 * after each value of the first coordinate. Numbers are right-aligned and separated by blanks; every line ends with a newline.
 *
 * @param commentLines without the leading '# '; see `jointTableComments`
 * @throws {InvalidInputError} TEMPERATURE_INVALID when energies are asked for in kT of no valid temperature
 */
export function formatJointTable(
  table: JointTable,
  units: JointTableUnits,
  commentLines: readonly string[],
): string {
  const comments = [...commentLines, '', columnNames(units)].map((line) => `# ${line}`.trimEnd())
  return `${comments.join('\n')}\n${formatJointRows(table, units)}`
}

/**
 * The rows of a joint table as text, without comments: what the checksum of a file is taken over.
 *
 * @returns one block per value of the first coordinate, blank lines between blocks
 */
export function formatJointRows(table: JointTable, units: JointTableUnits): string {
  const ny = table.y.length
  const lines = jointTableRows(table, units).map(
    (row, index) => `${index > 0 && index % ny === 0 ? '\n' : ''}${formatRow(row)}`,
  )
  return lines.join('')
}

function formatRow({ x, y, energy, xForce, yForce }: JointTableRow): string {
  const cells = [x, y, energy, xForce, yForce].map((value) => formatNumber(value).padStart(COLUMN_WIDTH))
  return `${cells.join(' ')}\n`
}

function columnNames({ coordinateUnits, energyUnit }: JointTableUnits): string {
  const [x, y] = coordinateUnits.map(unitWord)
  const energy = unitWord(energyUnit)
  const names = [
    `x[${x}]`,
    `y[${y}]`,
    `energy[${energy}]`,
    `xforce[${energy}/${x}]`,
    `yforce[${energy}/${y}]`,
  ]
  // The comment sign takes two places of the first column.
  return names.map((name, column) => name.padStart(COLUMN_WIDTH - (column === 0 ? 2 : 0))).join(' ')
}
