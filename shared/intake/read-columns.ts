import { InvalidInputError } from '../errors'
import { MAX_FILE_BYTES } from './intake-settings'
import type { NumericTable } from './numeric-table'
import { RowReader } from './row-reader'
import { scanNumber } from './scan-number'
import { detectSeparator, isComment, splitFields } from './separator'
import { trimmed } from './trimmed'

const LINE_FEED = '\n'
const CARRIAGE_RETURN = '\r'
const BYTE_ORDER_MARK = 0xfeff

/**
 * Reads a text file into columns of numbers. Fields are separated by comma, semicolon, or blanks and tabs; the first
 * data line decides. Lines that start with # @ ; ! or % are comments, and so is what follows a blank and # ! or %. A
 * line without any number above the data is a header. Byte order mark, CRLF and trailing separators are accepted.
 *
 * @param text the whole file
 * @throws {InvalidInputError} FILE_TOO_LARGE, FILE_EMPTY; COLUMN_MISSING or COLUMNS_UNEQUAL with line and column where a
 *   line has fewer or more fields than the first one; TEXT_NOT_A_NUMBER for a file without a single number
 * @example readColumns('r,n\n0.1,3\n0.2,5\n').values // 0.1, 3, 0.2, 5
 */
export function readColumns(text: string): NumericTable {
  if (text.length > MAX_FILE_BYTES) {
    throw new InvalidInputError('FILE_TOO_LARGE', `The file is larger than ${MAX_FILE_BYTES / 2 ** 20} MB.`)
  }
  const lineEnd = text.includes(LINE_FEED) ? LINE_FEED : CARRIAGE_RETURN
  let start = text.charCodeAt(0) === BYTE_ORDER_MARK ? 1 : 0
  let line = 0
  let header: string | null = null
  let headerLine = 0
  let comment: string | null = null
  let reader: RowReader | null = null
  while (start < text.length) {
    line++
    const found = text.indexOf(lineEnd, start)
    const next = found < 0 ? text.length : found
    const [from, to] = trimmed(text, start, next)
    start = next + 1
    if (from === to) continue
    if (isComment(text[from])) {
      if (reader === null) comment = text.slice(from + 1, to)
    } else if (reader !== null) {
      reader.read(from, to, line)
    } else {
      const content = text.slice(from, to)
      if (isHeader(content)) {
        header ??= content
        headerLine ||= line
      } else {
        reader = new RowReader(text, content, line)
        reader.read(from, to, line)
      }
    }
  }
  if (reader === null) throw nothingToRead(header, headerLine)
  return reader.finish(header ?? comment)
}

/** A line above the data is a header when none of its fields is a number, NaN and infinity included. */
function isHeader(content: string): boolean {
  const fields = splitFields(content, detectSeparator(content))
  return fields.every((field) => Number.isNaN(scanNumber(field, 0, field.length)) && !looksLikeNumber(field))
}

/** Words for "not a number" and numbers with a decimal comma: no header, but something to refuse by its name. */
function looksLikeNumber(field: string): boolean {
  return /^[+-]?(?:nan|inf|infinity|\d*,\d+(?:e[+-]?\d+)?)$/i.test(field)
}

function nothingToRead(header: string | null, line: number): InvalidInputError {
  if (header === null) {
    return new InvalidInputError('FILE_EMPTY', 'The file holds no data line: it is empty or all comments.')
  }
  const found = header.length > 40 ? `${header.slice(0, 40)}…` : header
  return new InvalidInputError(
    'TEXT_NOT_A_NUMBER',
    `Line ${line} holds no number, nor does any other: “${found}”.`,
    {
      line,
      column: 1,
    },
  )
}
