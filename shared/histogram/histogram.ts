import type { CoordinateKind } from '../units'
import type { BlockInefficiency } from './block-inefficiency'

export type { CoordinateKind } from '../units'

/** What the numbers of a histogram are: only counts carry noise that can be judged. */
export type BinContent = 'count' | 'density' | 'probability'

/**
 * A histogram of one coordinate in internal units (bond: nm; angle: rad in [0, π]; dihedral: rad in [−π, π)). Bins are
 * half-open, the last one closed. Made by `createHistogram`, which validates; trusted afterwards.
 */
export interface Histogram {
  readonly kind: CoordinateKind
  /** Ascending, length n + 1. */
  readonly edges: Float64Array
  /**
   * Length n, not negative. For content 'count' the counts; for 'density' and 'probability' the probability mass of each
   * bin, with sum 1.
   */
  readonly weights: Float64Array
  readonly content: BinContent
  /** Number of independent samples the histogram stands for, as the user stated it; null when nobody said. */
  readonly independentSamples: number | null
  /** Statistical inefficiency of the counts as blocks or chains show it; left out or null where none were measured. */
  readonly blocks?: BlockInefficiency | null
}
