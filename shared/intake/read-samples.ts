import { InvalidInputError } from '../errors'
import type { CoordinateKind } from '../histogram/histogram'
import { foldDihedral } from '../histogram'
import type { CoordinateUnit } from '../units'
import { coordinateValues } from './coordinate-values'
import { tableColumn } from './numeric-table'
import type { NumericTable } from './numeric-table'

/**
 * Raw samples from one column, in internal units, a dihedral folded into [−π, π).
 *
 * @param column counted from 0
 * @throws {InvalidInputError} as `tableColumn` and `coordinateValues`; TOO_FEW_SAMPLES below two
 */
export function readSamples(
  table: NumericTable,
  column: number,
  kind: CoordinateKind,
  unit: CoordinateUnit,
): Float64Array {
  const values = tableColumn(table, column, `a sample of the ${kind}`)
  if (values.length < 2) {
    throw new InvalidInputError('TOO_FEW_SAMPLES', 'The file holds a single sample.', {
      line: table.lines[0],
    })
  }
  const samples = coordinateValues({ values, lines: table.lines, column, kind, unit }, 'sample')
  return kind === 'dihedral' ? samples.map(foldDihedral) : samples
}
