import { InvalidInputError } from '../errors'
import type { ColumnFault, NumericTable } from './numeric-table'
import { scanNumber } from './scan-number'
import { detectSeparator, splitFields, splitNames, withoutInlineComment } from './separator'
import type { Separator } from './separator'
import { isBlank, trimmed } from './trimmed'

/** Collects rows of equal length into typed arrays that grow by doubling. */
export class RowReader {
  private readonly separator: Separator
  private readonly separatorCode: number
  private readonly columnCount: number
  private readonly firstLine: number
  private readonly faults: (ColumnFault | null)[]
  private values: Float64Array
  private lines: Int32Array
  private rowCount = 0

  constructor(
    private readonly text: string,
    firstContent: string,
    firstLine: number,
  ) {
    this.separator = detectSeparator(firstContent)
    this.separatorCode = this.separator === 'blank' ? -1 : this.separator.charCodeAt(0)
    this.columnCount = splitFields(firstContent, this.separator).length
    this.firstLine = firstLine
    this.faults = new Array<ColumnFault | null>(this.columnCount).fill(null)
    const capacity = Math.ceil(text.length / (firstContent.length + 1)) + 16
    this.values = new Float64Array(capacity * this.columnCount)
    this.lines = new Int32Array(capacity)
  }

  /** Reads the line that stands in the text from `start` to `end`, without blanks around it. */
  read(start: number, end: number, line: number): void {
    if (this.rowCount === this.lines.length) this.grow()
    const { text, columnCount, separatorCode } = this
    const base = this.rowCount * columnCount
    let at = start
    let field = 0
    while (at < end) {
      let stop = at
      if (separatorCode < 0) while (stop < end && !isBlank(text.charCodeAt(stop))) stop++
      else while (stop < end && text.charCodeAt(stop) !== separatorCode) stop++
      let last = stop
      while (last > at && isBlank(text.charCodeAt(last - 1))) last--
      const value = scanNumber(text, at, last)
      if (!Number.isFinite(value)) {
        const shortened = this.endBeforeComment(at, end)
        if (shortened < end) {
          end = shortened
          continue
        }
        if (field < columnCount) this.faults[field] ??= { line, text: text.slice(at, last) }
      }
      if (field === columnCount)
        this.throwUnequal(line, splitFields(text.slice(start, end), this.separator).length)
      this.values[base + field++] = value
      at = stop + (separatorCode < 0 ? 0 : 1)
      while (at < end && isBlank(text.charCodeAt(at))) at++
    }
    if (field === 0) return
    if (field < columnCount) this.throwUnequal(line, field)
    this.lines[this.rowCount++] = line
  }

  finish(title: string | null): NumericTable {
    const names = title === null ? [] : splitNames(title, this.separator)
    return {
      separator: this.separator,
      columnCount: this.columnCount,
      rowCount: this.rowCount,
      values: this.values.subarray(0, this.rowCount * this.columnCount),
      lines: this.lines.subarray(0, this.rowCount),
      names: names.length === this.columnCount ? names : null,
      faults: this.faults,
    }
  }

  private endBeforeComment(from: number, end: number): number {
    // one sign to the left, so that a comment sign at `from` sees the blank before it
    const start = Math.max(0, from - 1)
    const kept = withoutInlineComment(this.text.slice(start, end))
    return trimmed(this.text, from, Math.max(from, start + kept.length))[1]
  }

  private grow(): void {
    const values = new Float64Array(2 * this.values.length)
    values.set(this.values)
    this.values = values
    const lines = new Int32Array(2 * this.lines.length)
    lines.set(this.lines)
    this.lines = lines
  }

  private throwUnequal(line: number, found: number): never {
    const code = found < this.columnCount ? 'COLUMN_MISSING' : 'COLUMNS_UNEQUAL'
    throw new InvalidInputError(
      code,
      `Line ${line} has ${found} ${found === 1 ? 'field' : 'fields'} where line ${this.firstLine} has ${this.columnCount}.`,
      { line, column: Math.min(found, this.columnCount) + 1 },
    )
  }
}
