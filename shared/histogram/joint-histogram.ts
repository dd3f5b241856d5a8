import type { BinContent, CoordinateKind } from './histogram'

/**
 * A histogram of two coordinates in internal units, measured together. Bins are half-open, the last one of each
 * coordinate closed. Made by `createJointHistogram`, which validates; trusted afterwards.
 */
export interface JointHistogram {
  readonly kinds: readonly [CoordinateKind, CoordinateKind]
  /** Ascending, length nx + 1. */
  readonly xEdges: Float64Array
  /** Ascending, length ny + 1. */
  readonly yEdges: Float64Array
  /**
   * Length nx · ny, row-major: cell (ix, iy) stands at ix · ny + iy. Not negative. For content 'count' the counts; for
   * 'density' and 'probability' the probability mass of each cell, with sum 1.
   */
  readonly weights: Float64Array
  readonly content: BinContent
  /** As in `Histogram`: the sum of counts over g, or what the user stated; null when nobody said. */
  readonly independentSamples: number | null
}
