import { binVolumes, createHistogram } from '../histogram'
import type { BinContent, Histogram } from '../histogram/histogram'
import { axisInDomain } from './axis'
import { distributionGrid } from './distribution-grid'
import type { FileGrid } from './file-grid'
import { fileWeights } from './file-weights'
import { tooManyBins } from './grid-from-centres'
import { MAX_BINS } from './intake-settings'
import type { IntakeSettings } from './intake-settings'
import { mergeDoubledRows } from './merge-doubled'
import type { NumericTable } from './numeric-table'
import type { ReadResult } from './read-result'

/**
 * The histogram in a table of bins, in internal units; however few of its bins hold anything.
 *
 * @throws {InvalidInputError} whatever is wrong with the table, with line and column where it stands at one place
 */
export function binnedHistogram(table: NumericTable, settings: IntakeSettings): ReadResult<Histogram> {
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
  const { independentSamples } = settings
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
