import type { Histogram } from '../histogram/histogram'
import { NO_BLOCK_FILES } from './block-files'
import type { IntakeSettings } from './intake-settings'
import type { NumericTable } from './numeric-table'
import { readColumns } from './read-columns'
import { distributionFromTable } from './read-distribution'
import type { ReadResult } from './read-result'

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
  const { histogram, notes } = distributionFromTable(table, NO_BLOCK_FILES, settings)
  return { histogram, notes }
}
