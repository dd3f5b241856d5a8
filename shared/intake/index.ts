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
export { histogramFromTable, readHistogram, type ReadResult } from './read-histogram'
export { jointHistogramFromTable, MAX_CELLS, readJointHistogram } from './read-joint-histogram'
