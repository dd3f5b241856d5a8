import { InvalidInputError } from '../errors'
import { coordinateValues } from './coordinate-values'
import { distinctValues } from './distinct-values'
import type { FileGrid } from './file-grid'
import { gridFromCentres, tooManyBins } from './grid-from-centres'
import { MAX_BINS } from './intake-settings'
import type { JointIntakeSettings } from './intake-settings'
import { tableColumn } from './numeric-table'
import type { NumericTable } from './numeric-table'

/** The grid of one side of a two-dimensional file. */
export interface SideGrid {
  readonly grid: FileGrid
  /** Bin of the grid for each row of the table. */
  readonly binOfRow: Int32Array
}

/**
 * The bins of one coordinate, from its centres in any order of the lines.
 *
 * @param column counted from 0
 * @throws {InvalidInputError} as `tableColumn`, `coordinateValues`, `gridFromCentres`; TOO_MANY_BINS
 */
export function sideGrid(
  table: NumericTable,
  column: number,
  { kinds, units }: JointIntakeSettings,
  side: 0 | 1,
): SideGrid {
  const values = tableColumn(
    table,
    column,
    `the bin centre of the ${side === 0 ? 'first' : 'second'} coordinate`,
  )
  const [kind, unit] = [kinds[side], units[side]]
  const { distinct, indices } = distinctValues(
    coordinateValues({ values, lines: table.lines, column, kind, unit }, 'centre'),
  )
  if (distinct.length > MAX_BINS) throw tooManyBins(distinct.length)
  const grid = gridFromCentres(kind, unit, distinct)
  return { grid, binOfRow: indices.map((index) => grid.places[index]) }
}

/**
 * Puts the values of the lines into the cells of the grid; cells without a line are 0.
 *
 * @throws {InvalidInputError} BINS_OVERLAP with the line that states a cell again
 */
export function fillCells(table: NumericTable, x: SideGrid, y: SideGrid, weights: Float64Array) {
  const ny = y.grid.edges.length - 1
  const cells = new Float64Array((x.grid.edges.length - 1) * ny)
  const lineOf = new Int32Array(cells.length)
  weights.forEach((weight, row) => {
    const cell = x.binOfRow[row] * ny + y.binOfRow[row]
    const line = table.lines[row]
    if (lineOf[cell] > 0) {
      throw new InvalidInputError(
        'BINS_OVERLAP',
        `Line ${line} states the cell of line ${lineOf[cell]} again.`,
        { line },
      )
    }
    lineOf[cell] = line
    cells[cell] = weight
  })
  return { cells, missing: cells.length - weights.length }
}
