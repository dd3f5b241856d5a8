/** Digits of a number at most: what the screen and the tables show as well. */
const DIGITS = 7

/** What a spreadsheet begins a formula with, also in the wide signs of East Asian keyboards. */
const FORMULA_START = '[=+\\-@\\uff1d\\uff0b\\uff0d\\uff20]'

/** A formula at the start, behind blanks that some programs trim; or any control character there. */
const RUNS = new RegExp(`^\\s*${FORMULA_START}|^\\p{Cc}`, 'u')

/** A formula behind a semicolon, tab or line end: where semicolons part the cells of a file, it would begin one of its own. */
const RUNS_AFTER_SEPARATOR = new RegExp(`([;\\t\\r\\n]\\s*"*)(?=${FORMULA_START})`, 'gu')

/**
 * One cell of comma-separated values (RFC 4180). A number has at most seven significant digits and a point; one that is not
 * finite, like null, is an empty cell. Words that a spreadsheet would take as a formula get an apostrophe before them, so that
 * opening a file never runs anything, whether its cells are parted at commas, semicolons or tabs.
 *
 * @example csvCell('=1+1') // "'=1+1"
 */
export function csvCell(value: number | string | null): string {
  if (value === null) return ''
  if (typeof value === 'number')
    return Number.isFinite(value) ? String(Number(value.toPrecision(DIGITS))) : ''
  const words = (RUNS.test(value) ? `'${value}` : value).replace(RUNS_AFTER_SEPARATOR, "$1'")
  return /[",;\t\r\n]/.test(words) ? `"${words.replaceAll('"', '""')}"` : words
}

/** A formula behind whatever may part cells. */
const RUNS_AFTER_ANY = new RegExp(`([,;\\t]\\s*"*)(?=${FORMULA_START})`, 'gu')

/**
 * Words for a text file that may be opened as comma-separated values although it is not made of quoted cells: an apostrophe
 * stands before everything that would begin a formula, at the start and behind commas, semicolons and tabs.
 *
 * @example plainWords('bulk, =1+1') // "bulk, '=1+1"
 */
export function plainWords(words: string): string {
  return (RUNS.test(words) ? `'${words}` : words).replace(RUNS_AFTER_ANY, "$1'")
}
