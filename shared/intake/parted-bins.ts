import { InvalidInputError } from '../errors'
import { type BlockCounts, createHistogram } from '../histogram'
import type { Histogram } from '../histogram/histogram'
import { binnedHistogram } from './binned-histogram'
import { type BlockFiles, type DistributionReading, inFile } from './block-files'
import type { IntakeSettings } from './intake-settings'
import type { NumericTable } from './numeric-table'
import { readColumns } from './read-columns'
import type { ReadResult } from './read-result'

/** Edges of two files agree when they differ by no more than this share of a bin: text holds few digits. */
const GRID_SLACK = 1e-3

/**
 * A histogram of bins with the counts of its blocks, from columns of the main file, from files of their own, or both.
 *
 * @throws {InvalidInputError} as `binnedHistogram`, a block file by its name; BLOCKS_DIFFER where a block has another grid;
 *   SETTING_INVALID where blocks hold no counts
 */
export function partedBins(
  table: NumericTable,
  files: BlockFiles,
  settings: IntakeSettings,
): DistributionReading {
  const { firstOf } = files
  const whole = firstOf === null
  const main = mainHistogram(table, whole ? settings : { ...settings, independentSamples: null })
  const single = { ...settings, blocks: null, independentSamples: null }
  const blocks = [...main.columns]
  let { histogram } = main
  for (const kind of ['time', 'chain'] as const) {
    const counts = files[kind].map(({ name, text }) =>
      inFile(name, () => countsOnGrid(binnedHistogram(readColumns(text), single).histogram, histogram)),
    )
    if (firstOf === kind) counts.unshift(main.histogram.weights)
    if (counts.length === 0) continue
    checkCounts(histogram)
    blocks.push({ kind, counts })
    if (firstOf === kind) histogram = sumOf(histogram, counts, settings.independentSamples)
  }
  const added = whole ? [] : [`The counts of ${files[firstOf].length + 1} files were added up.`]
  return { histogram, notes: [...main.notes, ...added], blocks, sampleInefficiency: null }
}

/** The histogram of the main file: of its value column, or the sum of its block columns. */
function mainHistogram(
  table: NumericTable,
  settings: IntakeSettings,
): ReadResult<Histogram> & { readonly columns: readonly BlockCounts[] } {
  if (!settings.blocks) return { ...binnedHistogram(table, settings), columns: [] }
  const { kind, columns } = settings.blocks
  const read = columns.map((value) => {
    const own = { ...settings.columns, value }
    return binnedHistogram(table, { ...settings, columns: own, independentSamples: null })
  })
  const [{ histogram, notes }] = read
  checkCounts(histogram)
  const counts = read.map((each) => each.histogram.weights)
  return {
    histogram: sumOf(histogram, counts, settings.independentSamples),
    notes: [...notes, `The counts of ${columns.length} columns were added up.`],
    columns: [{ kind, counts }],
  }
}

/** A histogram with the counts of all its blocks. */
function sumOf(
  { kind, edges }: Histogram,
  counts: readonly Float64Array[],
  independentSamples: number | null,
): Histogram {
  const weights = edges.slice(1).map((_, bin) => counts.reduce((sum, block) => sum + block[bin], 0))
  return createHistogram({ kind, edges, weights, content: 'count', independentSamples })
}

function countsOnGrid(block: Histogram, { edges }: Histogram): Float64Array {
  const width = (edges[edges.length - 1] - edges[0]) / (edges.length - 1)
  const same =
    block.edges.length === edges.length &&
    block.edges.every((edge, index) => Math.abs(edge - edges[index]) <= GRID_SLACK * width)
  if (same) return block.weights
  throw new InvalidInputError(
    'BLOCKS_DIFFER',
    `its ${block.edges.length - 1} bins are not the ${edges.length - 1} bins of the main file. Bin all blocks on one grid.`,
  )
}

/** Blocks speak by the noise of their counts. @throws {InvalidInputError} SETTING_INVALID for a density or a probability */
function checkCounts({ content }: Histogram): void {
  if (content === 'count') return
  throw new InvalidInputError(
    'SETTING_INVALID',
    `Blocks tell how correlated samples are by their counts; these values are a ${content}.`,
    { field: 'value' },
  )
}
