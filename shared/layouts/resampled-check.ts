import type { Table } from '../tables'
import { energyScale } from '../units'
import type { CheckedFile } from './checked-file'
import { type LayoutCheck, shortNumber as short } from './layout-check'
import { type BeyondTable, tableCurve } from './table-curve'

/** An error of the curve between rows up to this, in kT, is no matter. */
const CURVE_ERROR = 1e-3

/** Rows between those of the table: how far the curve may be off, from what every second row would say about the others. */
export function resampledCheck({ table, values }: CheckedFile, beyond: BeyondTable | null): LayoutCheck {
  const { low, step, covers } = tableCurve(table)
  const between = values.internal.some((coordinate) => {
    const position = (coordinate - low) / step
    return covers(coordinate) && Math.abs(position - Math.round(position)) > 1e-6
  })
  const outside = beyond !== null && values.internal.some((coordinate) => !covers(coordinate))
  const beyondWords = outside ? ' Those beyond it come from the potential itself.' : ''
  if (!between)
    return { code: 'RESAMPLED', ok: true, message: `The rows are those of the saved table.${beyondWords}` }
  const error = curveError(table)
  return {
    code: 'RESAMPLED',
    ok: error <= CURVE_ERROR,
    message:
      error <= CURVE_ERROR
        ? `The rows lie between those of the saved table, on a curve that is within ${short(Math.max(error, 1e-9), 1)} kT.${beyondWords}`
        : `The rows lie between those of the saved table, which are too far apart: energies may be off by ${short(error, 2)} kT. Save the table with more rows.`,
  }
}

/** The error falls with the fourth power of the step: what half the rows miss at the others is sixteen times what all rows miss. */
function curveError(table: Table): number {
  const half = <Values extends Float64Array>(values: Values) => values.filter((_, row) => row % 2 === 0)
  const rows = table.coordinates.length - (table.coordinates.length % 2 === 0 ? 1 : 0)
  if (rows < 3) return Infinity
  const whole = (values: Float64Array) => values.subarray(0, rows)
  const coarse = tableCurve({
    ...table,
    coordinates: half(whole(table.coordinates)),
    energies: half(whole(table.energies)),
    forces: half(whole(table.forces)),
  })
  let worst = 0
  for (let row = 1; row < rows; row += 2) {
    worst = Math.max(worst, Math.abs(coarse.at(table.coordinates[row]).energy - table.energies[row]))
  }
  return (worst * energyScale('kT', table.temperature)) / 16
}
