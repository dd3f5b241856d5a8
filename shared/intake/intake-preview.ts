import type { InvalidInputCode, InputPlace } from '../errors'
import type { Histogram } from '../histogram/histogram'
import type { JointHistogram } from '../histogram/joint-histogram'
import type { IntakeSettings, JointIntakeSettings } from './intake-settings'

/** One of the first lines of a file, as it stands there and as it is understood. */
export interface PreviewLine {
  /** Counted from 1. */
  readonly line: number
  readonly text: string
  readonly role: 'comment' | 'header' | 'data' | 'blank'
  /** The fields of a data line, in the order of the file. */
  readonly fields: readonly string[]
}

/** Why a file is not accepted, as plain data that can cross to and from a worker. */
export interface IntakeError {
  readonly code: InvalidInputCode
  readonly message: string
  readonly place: InputPlace
}

/** What a file looks like under given or guessed settings, before anything is stored. */
export interface IntakePreview<Settings, Result> {
  /** As given, or guessed; null when the file has no columns to guess from. */
  readonly settings: Settings | null
  /** Why the settings were guessed as they are; empty when they were given. */
  readonly reasons: readonly string[]
  /** What was clipped, merged, filled or inferred on the way to the histogram. */
  readonly notes: readonly string[]
  readonly firstLines: readonly PreviewLine[]
  /** 0 when the file has no columns. */
  readonly columnCount: number
  /** Names of the columns from the header, or null when there is none that fits. */
  readonly columnNames: readonly string[] | null
  readonly histogram: Result | null
  readonly error: IntakeError | null
}

export type DistributionPreview = IntakePreview<IntakeSettings, Histogram>
export type JointPreview = IntakePreview<JointIntakeSettings, JointHistogram>
