import type { BlockKind } from '../histogram'
import type { BinContent, CoordinateKind } from '../histogram/histogram'
import type { CoordinateUnit } from '../units'

/** A line states a bin by its centre or by its two edges, or it is one raw sample. */
export type IntakeLayout = 'centre' | 'edges' | 'samples'

/**
 * Which column of the file holds what, counted from 0. `low` is the centre, the lower edge or the sample; `high` holds
 * the same column unless the layout is edges; `value` is without meaning for samples.
 */
export interface IntakeColumns {
  readonly low: number
  readonly high: number
  readonly value: number
}

/** Columns that hold the counts of one block or chain each, counted from 0; at least one. */
export interface BlockColumns {
  readonly kind: BlockKind
  readonly columns: readonly number[]
}

/**
 * How the text of a distribution is read (document version 1). Saved with the distribution, so that the kept file can
 * be read again to the same numbers. The contract `intakeSettingsSchema` validates it.
 */
export interface IntakeSettings {
  readonly version: 1
  readonly kind: CoordinateKind
  /** Unit of the coordinate in the file: a length for a bond, an angle for an angle or a dihedral. */
  readonly unit: CoordinateUnit
  readonly layout: IntakeLayout
  /** What the value column holds; without meaning for samples. */
  readonly value: BinContent
  readonly columns: IntakeColumns
  /** The values were divided by the Jacobian before they came here (r², sin θ). Asked at intake, default no. */
  readonly alreadyDivided: boolean
  /**
   * Number of independent samples the file stands for, as the user states it; null when nobody said: then blocks tell,
   * or the counts are taken as independent; unknown for a density or probability.
   */
  readonly independentSamples: number | null
  /** Where the file has a column of counts per block: the distribution is their sum, and `columns.value` without meaning. */
  readonly blocks?: BlockColumns | null
}

/** Which column of a two-dimensional file holds what, counted from 0; `value` is without meaning for samples. */
export interface JointIntakeColumns {
  readonly x: number
  readonly y: number
  readonly value: number
}

/**
 * How the text of a two-dimensional distribution is read (document version 1): a grid in long form, x, y and value in
 * any order of the lines, or paired samples x, y. The contract `jointIntakeSettingsSchema` validates it.
 */
export interface JointIntakeSettings {
  readonly version: 1
  readonly kinds: readonly [CoordinateKind, CoordinateKind]
  readonly units: readonly [CoordinateUnit, CoordinateUnit]
  readonly layout: 'grid' | 'samples'
  readonly value: BinContent
  readonly columns: JointIntakeColumns
  readonly independentSamples: number | null
}

/** Largest file the intake reads, in bytes. */
export const MAX_FILE_BYTES = 20 * 1024 * 1024

/** Most bins a histogram may have, per coordinate. */
export const MAX_BINS = 5_000

/** Least number of bins that must hold something. */
export const MIN_FILLED_BINS = 5
