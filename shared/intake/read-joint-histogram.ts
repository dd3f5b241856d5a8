import { InvalidInputError } from '../errors'
import { accumulateJoint, createJointHistogram, sampleEdges } from '../histogram'
import type { JointHistogram } from '../histogram/joint-histogram'
import { axisInDomain } from './axis'
import type { Axis } from './axis'
import { fileWeights, independentSamplesOf } from './file-weights'
import { fillCells, sideGrid } from './joint-grid'
import { MIN_FILLED_BINS } from './intake-settings'
import type { JointIntakeSettings } from './intake-settings'
import { mergeDoubledColumns, mergeDoubledRows } from './merge-doubled'
import type { NumericTable } from './numeric-table'
import { readColumns } from './read-columns'
import type { ReadResult } from './read-result'
import { readSamples } from './read-samples'

/** Most cells a joint histogram may have. */
export const MAX_CELLS = 1_000_000

/**
 * Reads the text of a two-dimensional distribution as the settings say, into internal units: a grid in long form, whose
 * lines may stand in any order and whose missing cells are empty, or pairs of samples.
 *
 * @throws {InvalidInputError} whatever is wrong with the file, with line and column where it stands at one place
 */
export function readJointHistogram(text: string, settings: JointIntakeSettings): ReadResult<JointHistogram> {
  return jointHistogramFromTable(readColumns(text), settings)
}

/** As `readJointHistogram`, for a text whose columns were read before. */
export function jointHistogramFromTable(
  table: NumericTable,
  settings: JointIntakeSettings,
): ReadResult<JointHistogram> {
  const result = settings.layout === 'samples' ? fromPairs(table, settings) : fromGrid(table, settings)
  const filled = result.histogram.weights.reduce((count, weight) => count + (weight > 0 ? 1 : 0), 0)
  if (filled < MIN_FILLED_BINS) {
    throw new InvalidInputError(
      'TOO_FEW_BINS',
      `Only ${filled} ${filled === 1 ? 'cell holds' : 'cells hold'} anything; at least ${MIN_FILLED_BINS} are needed.`,
    )
  }
  return result
}

function fromPairs(table: NumericTable, settings: JointIntakeSettings): ReadResult<JointHistogram> {
  const { kinds, units, columns, independentSamples } = settings
  const x = readSamples(table, columns.x, kinds[0], units[0])
  const y = readSamples(table, columns.y, kinds[1], units[1])
  const [xEdges, yEdges] = [sampleEdges(kinds[0], x), sampleEdges(kinds[1], y)]
  const [nx, ny] = [xEdges.length - 1, yEdges.length - 1]
  checkCells(nx, ny)
  const histogram = createJointHistogram({
    kinds,
    xEdges,
    yEdges,
    weights: accumulateJoint(x, y, xEdges, yEdges),
    content: 'count',
    independentSamples: independentSamples ?? x.length,
  })
  return { histogram, notes: [`${x.length} pairs of samples were put into ${nx} × ${ny} bins.`] }
}

function fromGrid(table: NumericTable, settings: JointIntakeSettings): ReadResult<JointHistogram> {
  const { kinds, units, columns, value } = settings
  const x = sideGrid(table, columns.x, settings, 0)
  const y = sideGrid(table, columns.y, settings, 1)
  checkCells(x.grid.edges.length, y.grid.edges.length)
  const weights = fileWeights(table, columns.value, value)
  const { cells, missing } = fillCells(table, x, y, weights)
  if (value === 'density') timesArea(cells, x.grid.edges, y.grid.edges)
  if (x.grid.doubled) mergeDoubledRows(cells, y.grid.edges.length - 1, value)
  if (y.grid.doubled) mergeDoubledColumns(cells, y.grid.edges.length - 1, value)
  const xAxis = axisInDomain(kinds[0], units[0], x.grid)
  const yAxis = axisInDomain(kinds[1], units[1], y.grid)
  const inDomain = toDomain(cells, y.grid.edges.length - 1, xAxis, yAxis)
  if (value === 'density') perArea(inDomain, xAxis.edges, yAxis.edges)
  const notes = [...xAxis.notes, ...yAxis.notes]
  if (missing > 0) notes.push(`${missing} cells without a line are empty.`)
  const histogram = createJointHistogram({
    kinds,
    xEdges: xAxis.edges,
    yEdges: yAxis.edges,
    weights: inDomain,
    content: value,
    independentSamples: independentSamplesOf(value, inDomain, settings.independentSamples),
  })
  return { histogram, notes }
}

function checkCells(nx: number, ny: number): void {
  if (nx * ny <= MAX_CELLS) return
  throw new InvalidInputError(
    'TOO_MANY_BINS',
    `A grid of ${nx} × ${ny} bins has more than ${MAX_CELLS} cells. Merge neighbouring bins.`,
  )
}

/** Cells of the domain from cells of the file's grid; a bin cut at ±180° gives each piece its share. */
function toDomain(cells: Float64Array, gridRows: number, x: Axis, y: Axis): Float64Array {
  const ny = y.sources.length
  const result = new Float64Array(x.sources.length * ny)
  x.sources.forEach((xSource, ix) => {
    y.sources.forEach((ySource, iy) => {
      if (xSource < 0 || ySource < 0) return
      result[ix * ny + iy] = cells[xSource * gridRows + ySource] * x.shares[ix] * y.shares[iy]
    })
  })
  return result
}

function timesArea(cells: Float64Array, xEdges: Float64Array, yEdges: Float64Array): void {
  const ny = yEdges.length - 1
  cells.forEach(
    (density, cell) => (cells[cell] = density * areaOf(Math.floor(cell / ny), cell % ny, xEdges, yEdges)),
  )
}

function perArea(cells: Float64Array, xEdges: Float64Array, yEdges: Float64Array): void {
  const ny = yEdges.length - 1
  cells.forEach(
    (mass, cell) => (cells[cell] = mass / areaOf(Math.floor(cell / ny), cell % ny, xEdges, yEdges)),
  )
}

function areaOf(ix: number, iy: number, xEdges: Float64Array, yEdges: Float64Array): number {
  return (xEdges[ix + 1] - xEdges[ix]) * (yEdges[iy + 1] - yEdges[iy])
}
