export { type BlockFiles, type DistributionReading, type NamedText, NO_BLOCK_FILES } from './block-files'
export { guessJointIntakeSettings } from './guess-joint-settings'
export { guessIntakeSettings, type SettingsGuess } from './guess-settings'
export type {
  DistributionPreview,
  IntakeError,
  IntakePreview,
  JointPreview,
  PreviewLine,
} from './intake-preview'
export {
  type BlockColumns,
  type IntakeColumns,
  type IntakeLayout,
  type IntakeSettings,
  type JointIntakeColumns,
  type JointIntakeSettings,
  MAX_BINS,
  MAX_FILE_BYTES,
  MIN_FILLED_BINS,
} from './intake-settings'
export type { NumericTable } from './numeric-table'
export { previewDistribution, previewJointDistribution } from './preview'
export { readColumns } from './read-columns'
export { distributionFromTable, readDistribution } from './read-distribution'
export { histogramFromTable, readHistogram } from './read-histogram'
export type { ReadResult } from './read-result'
export { jointHistogramFromTable, MAX_CELLS, readJointHistogram } from './read-joint-histogram'
