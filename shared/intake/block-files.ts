import { InvalidInputError } from '../errors'
import type { BlockCounts, BlockKind } from '../histogram'
import type { Histogram } from '../histogram/histogram'
import type { SeriesInefficiency } from '../numeric'
import type { ReadResult } from './read-result'

/** A file with the name that errors call it by. */
export interface NamedText {
  readonly name: string
  readonly text: string
}

/** Files that hold parts of a distribution, all read with the settings of its main file. */
export interface BlockFiles {
  /** In the order of time. */
  readonly time: readonly NamedText[]
  readonly chain: readonly NamedText[]
  /**
   * The main file is the first block of this kind, and the distribution is the sum of it and the files of that kind; null
   * where the main file holds the whole.
   */
  readonly firstOf: BlockKind | null
}

export const NO_BLOCK_FILES: BlockFiles = { time: [], chain: [], firstOf: null }

/** A distribution with what its parts say about correlation. */
export interface DistributionReading extends ReadResult<Histogram> {
  /** Counts of each block on the grid of the histogram, one set per kind and source. */
  readonly blocks: readonly BlockCounts[]
  /** From the raw samples of the main file, taken in their order; null for bins, and for samples that are all equal. */
  readonly sampleInefficiency: SeriesInefficiency | null
}

/** Runs what works on a block file; whatever is wrong with it is thrown again with the file's name in front. */
export function inFile<Result>(name: string, work: () => Result): Result {
  try {
    return work()
  } catch (error) {
    if (!(error instanceof InvalidInputError)) throw error
    // The place is one in the block file, not in the main file that places are shown in.
    throw new InvalidInputError(error.code, `${name}: ${error.message}`, { field: 'blocks' })
  }
}
