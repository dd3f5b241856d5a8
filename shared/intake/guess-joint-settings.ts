import type { CoordinateKind } from '../histogram/histogram'
import type { SettingsGuess } from './guess-settings'
import { guessUnit } from './guess-unit'
import { guessValue } from './guess-value'
import type { JointIntakeSettings } from './intake-settings'
import { rawColumn } from './numeric-table'
import type { NumericTable } from './numeric-table'

/**
 * Guesses how a two-dimensional file is to be read: two columns are paired samples, three or more a grid in long form.
 * Never throws: whatever is wrong shows when the file is read with the guess.
 */
export function guessJointIntakeSettings(
  table: NumericTable,
  kinds: readonly [CoordinateKind, CoordinateKind],
): SettingsGuess<JointIntakeSettings> {
  const nameOf = (column: number) => table.names?.[column] ?? null
  const columns = { x: 0, y: Math.min(1, table.columnCount - 1), value: Math.min(2, table.columnCount - 1) }
  const samples = table.columnCount < 3
  const values = samples ? null : rawColumn(table, columns.value)
  const value = values === null ? null : guessValue(values, nameOf(columns.value))
  const x = guessUnit(kinds[0], rawColumn(table, columns.x), values, nameOf(columns.x))
  const y = guessUnit(kinds[1], rawColumn(table, columns.y), values, nameOf(columns.y))
  const layout = samples ? 'Two columns: pairs of samples.' : 'Three columns: a grid in long form.'
  return {
    settings: {
      version: 1,
      kinds,
      units: [x.unit, y.unit],
      layout: samples ? 'samples' : 'grid',
      value: value?.value ?? 'count',
      columns,
      independentSamples: null,
    },
    reasons: [layout, ...(value === null ? [] : [value.reason]), x.reason, y.reason],
  }
}
