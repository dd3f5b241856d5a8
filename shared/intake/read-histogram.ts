import { InvalidInputError } from '../errors'
import { accumulate, binVolumes, createHistogram, sampleEdges } from '../histogram'
import type { BinContent, Histogram } from '../histogram/histogram'
import { axisInDomain } from './axis'
import { coordinateValues } from './coordinate-values'
import type { CoordinateRole } from './coordinate-values'
import type { FileGrid } from './file-grid'
import { fileWeights, independentSamplesOf } from './file-weights'
import { gridFromCentres, tooManyBins } from './grid-from-centres'
import { gridFromEdges } from './grid-from-edges'
import { MAX_BINS, MIN_FILLED_BINS } from './intake-settings'
import type { IntakeSettings } from './intake-settings'
import { tableColumn } from './numeric-table'
import type { NumericTable } from './numeric-table'
import { readColumns } from './read-columns'
import { readSamples } from './read-samples'

/** A histogram and what was clipped, merged, filled or inferred on the way to it, in sentences. */
export interface ReadResult<Result> {
  readonly histogram: Result
  readonly notes: readonly string[]
}

/**
 * Reads the text of a distribution as the settings say, into internal units.
 *
 * @throws {InvalidInputError} whatever is wrong with the file, with line and column where it stands at one place
 * @example readHistogram(text, guessIntakeSettings(readColumns(text), 'bond').settings).histogram.edges
 */
export function readHistogram(text: string, settings: IntakeSettings): ReadResult<Histogram> {
  return histogramFromTable(readColumns(text), settings)
}

/** As `readHistogram`, for a text whose columns were read before. */
export function histogramFromTable(table: NumericTable, settings: IntakeSettings): ReadResult<Histogram> {
  const result = settings.layout === 'samples' ? fromSamples(table, settings) : fromBins(table, settings)
  const filled = result.histogram.weights.reduce((count, weight) => count + (weight > 0 ? 1 : 0), 0)
  if (filled < MIN_FILLED_BINS) {
    throw new InvalidInputError(
      'TOO_FEW_BINS',
      `Only ${filled} ${filled === 1 ? 'bin holds' : 'bins hold'} anything; at least ${MIN_FILLED_BINS} are needed to ` +
        'make a potential.',
    )
  }
  return result
}

function fromSamples(table: NumericTable, settings: IntakeSettings): ReadResult<Histogram> {
  const { kind, unit, columns, independentSamples, alreadyDivided } = settings
  if (alreadyDivided) {
    throw new InvalidInputError(
      'SETTING_INVALID',
      'Raw samples cannot have been divided by their Jacobian.',
      {
        field: 'alreadyDivided',
      },
    )
  }
  const samples = readSamples(table, columns.low, kind, unit)
  const edges = sampleEdges(kind, samples)
  const histogram = createHistogram({
    kind,
    edges,
    weights: accumulate(samples, edges),
    content: 'count',
    independentSamples: independentSamples ?? samples.length,
  })
  return { histogram, notes: [`${samples.length} samples were put into ${edges.length - 1} bins.`] }
}

function fromBins(table: NumericTable, settings: IntakeSettings): ReadResult<Histogram> {
  const { kind, unit, value, columns } = settings
  if (table.rowCount > MAX_BINS) throw tooManyBins(table.rowCount)
  const grid = settings.layout === 'centre' ? centreGrid(table, settings) : edgeGrid(table, settings)
  const weights = fileWeights(table, columns.value, value)
  const masses = gridMasses(grid, weights, value)
  const axis = axisInDomain(kind, unit, grid)
  const perBin = Float64Array.from(axis.sources, (source, bin) =>
    source < 0 ? 0 : masses[source] * axis.shares[bin],
  )
  const notes = [...axis.notes]
  let content = value
  if (settings.alreadyDivided) {
    const volumes = binVolumes(kind, axis.edges)
    perBin.forEach(
      (mass, bin) => (perBin[bin] = (mass * volumes[bin]) / (axis.edges[bin + 1] - axis.edges[bin])),
    )
    if (content === 'count') content = 'probability'
    notes.push(
      'The values were multiplied by the Jacobian, since the file was divided by it; what is left of counts carries no noise.',
    )
  }
  if (content === 'density')
    perBin.forEach((mass, bin) => (perBin[bin] = mass / (axis.edges[bin + 1] - axis.edges[bin])))
  const independentSamples = independentSamplesOf(content, perBin, settings.independentSamples)
  return {
    histogram: createHistogram({ kind, edges: axis.edges, weights: perBin, content, independentSamples }),
    notes,
  }
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

/** What each bin of the file's grid holds: counts, or masses up to a common factor. */
function gridMasses(grid: FileGrid, weights: Float64Array, value: BinContent): Float64Array {
  const masses = new Float64Array(grid.edges.length - 1)
  weights.forEach((weight, row) => (masses[grid.places[row]] += weight))
  if (value === 'density')
    masses.forEach((density, bin) => (masses[bin] = density * (grid.edges[bin + 1] - grid.edges[bin])))
  if (grid.doubled) mergeDoubled(masses, value)
  return masses
}

/** One bin stated twice: equal values are repeated ones, different ones are halves of it. */
function mergeDoubled(masses: Float64Array, value: BinContent): void {
  const last = masses.length - 1
  if (masses[last] === masses[0]) return
  masses[0] += masses[last]
  if (value === 'density') masses[0] /= 2
}
