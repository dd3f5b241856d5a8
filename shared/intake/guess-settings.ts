import type { CoordinateKind } from '../histogram/histogram'
import { guessUnit } from './guess-unit'
import { guessValue } from './guess-value'
import { MAX_BINS } from './intake-settings'
import type { IntakeLayout, IntakeSettings } from './intake-settings'
import type { NumericTable } from './numeric-table'
import { rawColumn } from './numeric-table'

/** Guessed settings and, in sentences, why. */
export interface SettingsGuess<Settings> {
  readonly settings: Settings
  readonly reasons: readonly string[]
}

interface LayoutGuess {
  layout: IntakeLayout
  low: number
  high: number
  reason: string
}

/** Largest coordinate of a histogram in any unit (360°, or a bond of 500 Å): beyond it a column is a time or a step. */
const LARGEST_COORDINATE = 500

/**
 * Guesses how a distribution's file is to be read, for the user to confirm: which columns hold the bins, what the values
 * are, and in which unit. Never throws: whatever is wrong shows when the file is read with the guess.
 */
export function guessIntakeSettings(
  table: NumericTable,
  kind: CoordinateKind,
): SettingsGuess<IntakeSettings> {
  const { layout, low, high, reason } = guessLayout(table)
  const nameOf = (column: number) => table.names?.[column] ?? null
  const coordinates = rawColumn(table, low)
  if (layout === 'samples') {
    const { unit, reason: unitReason } = guessUnit(kind, coordinates, null, nameOf(low))
    return {
      settings: settingsOf(kind, unit, layout, 'count', { low, high: low, value: low }),
      reasons: [reason, unitReason],
    }
  }
  const valueColumn = guessValueColumn(table, high)
  const values = rawColumn(table, valueColumn)
  const value = guessValue(values, nameOf(valueColumn))
  const unit = guessUnit(kind, coordinates, values, nameOf(low))
  return {
    settings: settingsOf(kind, unit.unit, layout, value.value, { low, high, value: valueColumn }),
    reasons: [reason, value.reason, unit.reason],
  }
}

function settingsOf(
  kind: CoordinateKind,
  unit: IntakeSettings['unit'],
  layout: IntakeLayout,
  value: IntakeSettings['value'],
  columns: IntakeSettings['columns'],
): IntakeSettings {
  return { version: 1, kind, unit, layout, value, columns, alreadyDivided: false, independentSamples: null }
}

function guessLayout(table: NumericTable): LayoutGuess {
  const { columnCount, rowCount, names } = table
  if (columnCount === 1) {
    return { layout: 'samples', low: 0, high: 0, reason: 'One column: raw samples.' }
  }
  const first = rawColumn(table, 0)
  for (let low = 0; low < columnCount - 2; low++) {
    if (!areEdges(rawColumn(table, low), rawColumn(table, low + 1))) continue
    const reason = `Columns ${low + 1} and ${low + 2} are the two edges of bins.`
    return { layout: 'edges', low, high: low + 1, reason }
  }
  const timeNamed = names !== null && /time|step|frame|^t$|^t[ ([_]/i.test(names[0])
  const last = first[rowCount - 1]
  if (timeNamed || rowCount > MAX_BINS || (ascends(first) && last > LARGEST_COORDINATE)) {
    const why = timeNamed
      ? `is called “${names[0]}”`
      : rowCount > MAX_BINS
        ? `has ${rowCount} rows`
        : `reaches ${last}`
    return { layout: 'samples', low: 1, high: 1, reason: `Column 1 ${why}: column 2 holds raw samples.` }
  }
  const skipsIndex = columnCount >= 3 && countsUp(first) && ascends(rawColumn(table, 1))
  const low = skipsIndex ? 1 : 0
  const numbering = skipsIndex ? ' Column 1 only numbers the rows.' : ''
  return { layout: 'centre', low, high: low, reason: `Column ${low + 1} holds the bin centres.${numbering}` }
}

/** The column right of the bins, unless a later one is called count, which carries more than a density does. */
function guessValueColumn(table: NumericTable, lastOfBins: number): number {
  const next = Math.min(lastOfBins + 1, table.columnCount - 1)
  if (table.names === null) return next
  for (let column = next; column < table.columnCount; column++) {
    if (/count/i.test(table.names[column])) return column
  }
  return next
}

/** Two columns are edges when each bin has a width and begins where one before it ended, or later. */
function areEdges(lows: Float64Array, highs: Float64Array): boolean {
  let touching = 0
  for (let row = 0; row < lows.length; row++) {
    const width = highs[row] - lows[row]
    if (!(width > 0)) return false
    if (row > 0 && lows[row] < highs[row - 1] - 0.02 * width) return false
    if (row > 0 && lows[row] < highs[row - 1] + 0.02 * width) touching++
  }
  return touching >= (lows.length - 1) / 2
}

function ascends(values: Float64Array): boolean {
  return values.every((value, row) => row === 0 || value > values[row - 1])
}

function countsUp(values: Float64Array): boolean {
  return (values[0] === 0 || values[0] === 1) && values.every((value, row) => value === values[0] + row)
}
