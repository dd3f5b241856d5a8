/** A column of numbers or words with its header; empty where a value is null or NaN. */
export interface CsvColumn {
  /** Quantity and unit, as in "U (kJ/mol)". */
  readonly header: string
  readonly values: ArrayLike<number | string | null>
}

/** Digits of a number at most: what the screen and the tables show as well. */
const DIGITS = 7

/**
 * Columns side by side as comma-separated values (RFC 4180): notes behind "# ", one row of headers, then the rows; columns
 * that are shorter than others end in empty cells. UTF-8 without a byte order mark.
 *
 * @param notes lines of plain text before the headers
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

/**
 * One cell. A number has at most seven significant digits and a point; words that a spreadsheet would take as a formula (they
 * begin with = + - @ or a control character) get an apostrophe before them, so that opening a file never runs anything.
 */
export function csvCell(value: number | string | null): string {
  if (value === null) return ''
  if (typeof value === 'number')
    return Number.isFinite(value) ? String(Number(value.toPrecision(DIGITS))) : ''
  const words = /^[=+\-@\t\r\n]/.test(value) ? `'${value}` : value
  return /[",\r\n]/.test(words) ? `"${words.replaceAll('"', '""')}"` : words
}
