import type { CoordinateKind } from '../units'

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
  /**
   * Number of independent samples the histogram stands for: the sum of counts divided by the statistical inefficiency,
   * or what the user stated; null when nobody said.
   */
  readonly independentSamples: number | null
}
