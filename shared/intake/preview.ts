import { InvalidInputError } from '../errors'
import type { CoordinateKind } from '../histogram/histogram'
import { firstLines } from './first-lines'
import { guessJointIntakeSettings } from './guess-joint-settings'
import { guessIntakeSettings } from './guess-settings'
import type { SettingsGuess } from './guess-settings'
import type { DistributionPreview, IntakePreview, JointPreview } from './intake-preview'
import { type BlockFiles, NO_BLOCK_FILES } from './block-files'
import type { IntakeSettings, JointIntakeSettings } from './intake-settings'
import type { NumericTable } from './numeric-table'
import { readColumns } from './read-columns'
import { distributionFromTable } from './read-distribution'
import type { ReadResult } from './read-result'
import { jointHistogramFromTable } from './read-joint-histogram'

/**
 * What a distribution's file looks like before anything is stored. Whatever is wrong with the file is part of the
 * preview, not thrown.
 *
 * @param settings null to have them guessed
 * @param blockFiles files of its blocks or chains, read with the same settings
 */
export function previewDistribution(
  text: string,
  kind: CoordinateKind,
  settings: IntakeSettings | null,
  blockFiles: BlockFiles = NO_BLOCK_FILES,
): DistributionPreview {
  return preview(
    text,
    settings,
    (table) => guessIntakeSettings(table, kind),
    (table, known) => distributionFromTable(table, blockFiles, known),
  )
}

/** As `previewDistribution`, for a two-dimensional file. */
export function previewJointDistribution(
  text: string,
  kinds: readonly [CoordinateKind, CoordinateKind],
  settings: JointIntakeSettings | null,
): JointPreview {
  return preview(text, settings, (table) => guessJointIntakeSettings(table, kinds), jointHistogramFromTable)
}

function preview<Settings, Result>(
  text: string,
  given: Settings | null,
  guess: (table: NumericTable) => SettingsGuess<Settings>,
  read: (table: NumericTable, settings: Settings) => ReadResult<Result>,
): IntakePreview<Settings, Result> {
  let settings = given
  let reasons: readonly string[] = []
  let columnCount = 0
  let columnNames: readonly string[] | null = null
  const shown = () => ({ reasons, firstLines: firstLines(text), columnCount, columnNames })
  try {
    const table = readColumns(text)
    columnCount = table.columnCount
    columnNames = table.names
    if (settings === null) ({ settings, reasons } = guess(table))
    const { histogram, notes } = read(table, settings)
    return { ...shown(), settings, notes, histogram, error: null }
  } catch (error) {
    if (!(error instanceof InvalidInputError)) throw error
    const { code, message, place } = error
    return { ...shown(), settings, notes: [], histogram: null, error: { code, message, place } }
  }
}
