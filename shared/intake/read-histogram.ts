import { InvalidInputError } from '../errors'
import { accumulate, binVolumes, createHistogram, sampleEdges } from '../histogram'
import type { BinContent, Histogram } from '../histogram/histogram'
import { axisInDomain } from './axis'
import { distributionGrid } from './distribution-grid'
import type { FileGrid } from './file-grid'
import { fileWeights, independentSamplesOf } from './file-weights'
import { tooManyBins } from './grid-from-centres'
import { MAX_BINS, MIN_FILLED_BINS } from './intake-settings'
import type { IntakeSettings } from './intake-settings'
import { mergeDoubledRows } from './merge-doubled'
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
  const grid = distributionGrid(table, settings)
  const weights = fileWeights(table, columns.value, value)
  const masses = gridMasses(grid, weights, value)
  const axis = axisInDomain(kind, unit, grid)
  const perBin = Float64Array.from(axis.sources, (source, bin) =>
    source < 0 ? 0 : masses[source] * axis.shares[bin],
  )
  const notes = [...axis.notes]
  const content = settings.alreadyDivided && value === 'count' ? 'probability' : value
  if (settings.alreadyDivided) {
    const volumes = binVolumes(kind, axis.edges)
    perBin.forEach((mass, bin) => (perBin[bin] = (mass * volumes[bin]) / binWidth(axis.edges, bin)))
    notes.push('The values were multiplied by the Jacobian, since the file was divided by it.')
    if (value === 'count')
      notes.push('Counts divided by a Jacobian are counts no more: read as a probability.')
  }
  if (content === 'density') perBin.forEach((mass, bin) => (perBin[bin] = mass / binWidth(axis.edges, bin)))
  const independentSamples = independentSamplesOf(content, perBin, settings.independentSamples)
  return {
    histogram: createHistogram({ kind, edges: axis.edges, weights: perBin, content, independentSamples }),
    notes,
  }
}

/** What each bin of the file's grid holds: counts, or masses up to a common factor. */
function gridMasses(grid: FileGrid, weights: Float64Array, value: BinContent): Float64Array {
  const masses = new Float64Array(grid.edges.length - 1)
  weights.forEach((weight, row) => (masses[grid.places[row]] += weight))
  if (value === 'density')
    masses.forEach((density, bin) => (masses[bin] = density * binWidth(grid.edges, bin)))
  if (grid.doubled) mergeDoubledRows(masses, 1, value)
  return masses
}

function binWidth(edges: Float64Array, bin: number): number {
  return edges[bin + 1] - edges[bin]
}
