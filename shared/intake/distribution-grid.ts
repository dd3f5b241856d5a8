import { InvalidInputError } from '../errors'
import { coordinateValues } from './coordinate-values'
import type { CoordinateRole } from './coordinate-values'
import type { FileGrid } from './file-grid'
import { gridFromCentres } from './grid-from-centres'
import { gridFromEdges } from './grid-from-edges'
import type { IntakeSettings } from './intake-settings'
import { tableColumn } from './numeric-table'
import type { NumericTable } from './numeric-table'

/**
 * The bins a distribution's file states, by centres or by edges.
 *
 * @throws {InvalidInputError} as `tableColumn`, `coordinateValues`, `gridFromCentres`, `gridFromEdges`;
 *   BINS_NOT_ASCENDING with line and column; DECIMAL_COMMA where that is what the file looks like
 */
export function distributionGrid(table: NumericTable, settings: IntakeSettings): FileGrid {
  return settings.layout === 'centre' ? centreGrid(table, settings) : edgeGrid(table, settings)
}

function coordinates(
  table: NumericTable,
  column: number,
  role: CoordinateRole,
  { kind, unit }: IntakeSettings,
) {
  const values = tableColumn(table, column, role === 'centre' ? 'a bin centre' : 'a bin edge')
  return coordinateValues({ values, lines: table.lines, column, kind, unit }, role)
}

function centreGrid(table: NumericTable, settings: IntakeSettings): FileGrid {
  const column = settings.columns.low
  const centres = coordinates(table, column, 'centre', settings)
  for (let row = 1; row < centres.length; row++) {
    if (centres[row] <= centres[row - 1]) throw notAscending(table, row, column)
  }
  return gridFromCentres(settings.kind, settings.unit, centres)
}

function notAscending(table: NumericTable, row: number, column: number): InvalidInputError {
  const line = table.lines[row]
  const place = { line, column: column + 1 }
  // "0,352" reads as two whole numbers, and the first of them hardly ever ascends.
  if (table.separator === ',' && table.values.every(Number.isInteger)) {
    return new InvalidInputError(
      'DECIMAL_COMMA',
      `Line ${line}: the bins do not ascend and every field is a whole number. If the commas are decimal commas, write ` +
        'decimal points.',
      place,
    )
  }
  return new InvalidInputError(
    'BINS_NOT_ASCENDING',
    `Line ${line}, column ${column + 1}: the bin centre is not above the one before it.`,
    place,
  )
}

function edgeGrid(table: NumericTable, settings: IntakeSettings): FileGrid {
  const lows = coordinates(table, settings.columns.low, 'edge', settings)
  const highs = coordinates(table, settings.columns.high, 'edge', settings)
  return gridFromEdges(settings.unit, lows, highs, table.lines)
}
