import { InvalidInputError } from '../errors'
import { type BlockInefficiency, blockInefficiency, rulingInefficiency } from '../histogram'
import type { Histogram } from '../histogram/histogram'
import type { BlockFiles, DistributionReading, NamedText } from './block-files'
import { type IntakeSettings, MIN_FILLED_BINS } from './intake-settings'
import type { NumericTable } from './numeric-table'
import { partedBins } from './parted-bins'
import { readColumns } from './read-columns'
import { sampledHistogram } from './sampled-histogram'

/**
 * Reads a distribution with the files of its blocks or chains. The larger statistical inefficiency of them goes with the
 * histogram as `blocks`.
 *
 * @throws {InvalidInputError} whatever is wrong with a file, a block file by its name; BLOCKS_DIFFER where a block has
 *   another grid; TOO_FEW_BLOCKS with 1 to 9 blocks of a kind; SETTING_INVALID where the blocks hold no counts; TOO_FEW_BINS
 */
export function readDistribution(
  file: NamedText,
  blockFiles: BlockFiles,
  settings: IntakeSettings,
): DistributionReading {
  return distributionFromTable(readColumns(file.text), blockFiles, settings)
}

/** As `readDistribution`, for a main file whose columns were read before. */
export function distributionFromTable(
  table: NumericTable,
  blockFiles: BlockFiles,
  settings: IntakeSettings,
): DistributionReading {
  const parted =
    settings.layout === 'samples'
      ? sampledHistogram(table, blockFiles, settings)
      : partedBins(table, blockFiles, settings)
  const { blocks, sampleInefficiency } = parted
  const found = blocks.map(blockInefficiency)
  const histogram = { ...parted.histogram, blocks: rulingInefficiency(found) }
  checkFilled(histogram)
  return { histogram, notes: [...parted.notes, ...found.map(blockNote)], blocks, sampleInefficiency }
}

function checkFilled({ weights }: Histogram): void {
  const filled = weights.reduce((count, weight) => count + (weight > 0 ? 1 : 0), 0)
  if (filled >= MIN_FILLED_BINS) return
  throw new InvalidInputError(
    'TOO_FEW_BINS',
    `Only ${filled} ${filled === 1 ? 'bin holds' : 'bins hold'} anything; at least ${MIN_FILLED_BINS} are needed to ` +
      'make a potential.',
  )
}

function blockNote({ kind, count, inefficiency, deviation }: BlockInefficiency): string {
  const what = kind === 'time' ? 'time blocks' : 'chains'
  return `${count} ${what} give a statistical inefficiency of ${inefficiency.toPrecision(3)} ± ${deviation.toPrecision(2)}.`
}
