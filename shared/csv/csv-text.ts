import { csvCell } from './csv-cell'

/** A column of numbers or words with its header; empty where a value is null or NaN. */
export interface CsvColumn {
  /** Quantity and unit, as in "U (kJ/mol)". */
  readonly header: string
  readonly values: ArrayLike<number | string | null>
}

/**
 * Columns side by side as comma-separated values (RFC 4180): notes behind "# ", one row of headers, then the rows; columns
 * that are shorter than others end in empty cells. UTF-8 without a byte order mark.
 *
 * @param notes lines of plain text before the headers
 * @param columns at least one; a cell is written as `csvCell` says
 */
export function csvText(notes: readonly string[], columns: readonly CsvColumn[]): string {
  const rows = Math.max(...columns.map(({ values }) => values.length))
  const lines = [
    ...notes.map((note) => csvCell(`# ${note}`)),
    columns.map(({ header }) => csvCell(header)).join(','),
    ...Array.from({ length: rows }, (_, row) =>
      columns.map(({ values }) => csvCell(row < values.length ? values[row] : null)).join(','),
    ),
  ]
  return `${lines.join('\r\n')}\r\n`
}
