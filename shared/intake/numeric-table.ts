import { InvalidInputError } from '../errors'
import type { Separator } from './separator'

/** The first field of a column that holds no finite number. */
export interface ColumnFault {
  readonly line: number
  readonly text: string
}

/** The numbers of a text file, with the line each row came from, so that later checks can point to it. */
export interface NumericTable {
  readonly separator: Separator
  readonly columnCount: number
  readonly rowCount: number
  /** Row-major, rowCount · columnCount; NaN where a field holds no number. */
  readonly values: Float64Array
  /** Line of each row, counted from 1. */
  readonly lines: Int32Array
  /** From the header, or from a comment right above the data with as many words as there are columns; else null. */
  readonly names: readonly string[] | null
  /** Per column the first field that is no finite number, or null. It matters only when the column is used. */
  readonly faults: readonly (ColumnFault | null)[]
}

/**
 * One column of the table.
 *
 * @param index counted from 0
 * @param what what the column is to hold, for the message
 * @throws {InvalidInputError} COLUMN_MISSING; DECIMAL_COMMA, NUMBER_NOT_FINITE or TEXT_NOT_A_NUMBER with line and column
 *   of the first field that is no finite number
 */
export function tableColumn(table: NumericTable, index: number, what: string): Float64Array {
  const { columnCount } = table
  if (index >= columnCount) {
    const have = columnCount === 1 ? 'one column' : `${columnCount} columns`
    throw new InvalidInputError(
      'COLUMN_MISSING',
      `Column ${index + 1} should hold ${what}, but the file has ${have}.`,
      {
        line: table.lines[0],
        column: index + 1,
      },
    )
  }
  const fault = table.faults[index]
  if (fault !== null) throw faultError(fault, index, what)
  return rawColumn(table, index)
}

function faultError({ line, text }: ColumnFault, index: number, what: string): InvalidInputError {
  const place = { line, column: index + 1 }
  const where = `Line ${line}, column ${index + 1}`
  const shown = text.length > 40 ? `${text.slice(0, 40)}…` : text
  if (/^[+-]?\d*,\d+(?:[eE][+-]?\d+)?$/.test(text)) {
    return new InvalidInputError(
      'DECIMAL_COMMA',
      `${where}: “${shown}” has a decimal comma. Write decimal points, for instance ${text.replace(',', '.')}.`,
      place,
    )
  }
  if (/^[+-]?(?:nan|inf|infinity|\d+\.?\d*[ed]\+?\d+)$/i.test(text)) {
    return new InvalidInputError(
      'NUMBER_NOT_FINITE',
      `${where}: ${what} is ${shown}, not a finite number.`,
      place,
    )
  }
  const found = text === '' ? 'an empty field' : `“${shown}”`
  return new InvalidInputError(
    'TEXT_NOT_A_NUMBER',
    `${where}: ${found} stands where ${what} should be.`,
    place,
  )
}

/** One column as it was read, NaN where a field holds no number; for guessing, before anything is checked. */
export function rawColumn({ columnCount, rowCount, values }: NumericTable, index: number): Float64Array {
  const column = new Float64Array(rowCount)
  for (let row = 0; row < rowCount; row++) column[row] = values[row * columnCount + index]
  return column
}
