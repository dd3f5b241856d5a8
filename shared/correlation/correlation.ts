import type { BinContent, CoordinateKind } from '../histogram/histogram'
import type { CorrelationBasins } from './correlation-basins'

/**
 * May two terms be treated one by one? 'undecided' means: too few samples to say, or nobody said how many there are.
 */
export type CorrelationVerdict = 'separable' | 'borderline' | 'joint' | 'undecided'

/** Our default: below this mutual information, in nats, two terms are called separable. */
export const SEPARABLE_BELOW = 0.02

/** Our default: from this mutual information on, in nats, a joint potential is advised. */
export const JOINT_ABOVE = 0.1

/** From which mutual information on a verdict speaks, in nats. */
export interface VerdictThresholds {
  /** Below it two terms are separable. */
  readonly separableBelow: number
  /** From it on a joint potential is advised; above `separableBelow`. */
  readonly jointAbove: number
}

/** Our defaults; a group may set its own. */
export const DEFAULT_THRESHOLDS: VerdictThresholds = {
  separableBelow: SEPARABLE_BELOW,
  jointAbove: JOINT_ABOVE,
}

/** Share of null tables that may reach the measured mutual information before it counts as chance. */
export const SIGNIFICANCE = 0.01

export type CorrelationWarningCode =
  'SAMPLE_SIZE_UNKNOWN' | 'TOO_FEW_SAMPLES' | 'BASINS_BEYOND_PRODUCT' | 'CIRCULAR_COEFFICIENT'

/** `message`: what and why, with the number; `action`: what to do about it. */
export interface CorrelationWarning {
  readonly code: CorrelationWarningCode
  readonly message: string
  readonly action: string
}

/** The mean of the second coordinate in one bin of the first. Internal units. */
export interface ConditionalMean {
  /** Midpoint of the bin of the first coordinate. */
  readonly x: number
  /** Mean of the second coordinate; the circular mean for a dihedral. */
  readonly mean: number
  /** Standard deviation of the second coordinate in this bin. */
  readonly deviation: number
  /** Standard error of the mean, from the number of independent samples; null when that is unknown. */
  readonly error: number | null
  /** Number of independent samples in this bin; null when unknown. */
  readonly count: number | null
}

/**
 * ln[p₁₂/(p₁p₂)] in kT on a grid of its own: the bins of the file, merged where they are too thin to say anything.
 * Positive where the two coordinates meet more often than independence allows.
 */
export interface CouplingMap {
  readonly xEdges: Float64Array
  readonly yEdges: Float64Array
  /**
   * Row-major as the joint histogram; NaN where fewer than 10 independent samples are expected (without a sample size:
   * where p₁p₂ is below 1 % of its peak or nothing was seen). A cell without a sample where e are expected stands at
   * ln(½/e): half a sample, since −∞ would claim too much.
   */
  readonly values: Float64Array
  /** Standard deviation of each value, 1/√n in kT; NaN where the value is, and everywhere without a sample size. */
  readonly deviations: Float64Array
}

/** The largest |coupling| of the map and where it stands (midpoint of its cell, internal units). */
export interface LargestCoupling {
  /** Signed, in kT. */
  readonly value: number
  /** Standard deviation in kT; null when the sample size is unknown. */
  readonly deviation: number | null
  readonly x: number
  readonly y: number
}

/** The grid on which the verdict was reached: the bins of the file merged to about √(N/8) a side. */
export interface VerdictGrid {
  readonly xEdges: Float64Array
  readonly yEdges: Float64Array
  /** Probability mass of each cell, row-major, sum 1. */
  readonly masses: Float64Array
}

/**
 * What a joint histogram says about treating its two coordinates as independent (methods §6). Informations are in
 * nats; coordinates in internal units; grids row-major as the joint histogram.
 */
export interface Correlation {
  readonly kinds: readonly [CoordinateKind, CoordinateKind]
  readonly content: BinContent
  /** Sum of the counts; null for a density or probability. */
  readonly samples: number | null
  /** Number of independent samples behind the verdict; null when unknown. */
  readonly independentSamples: number | null
  /** Edges of the file's own grid. */
  readonly xEdges: Float64Array
  readonly yEdges: Float64Array
  /** p₁₂ per volume on the file's grid, mass over the product of the exact bin volumes; integrates to 1 with them. */
  readonly density: Float64Array
  /** Probability mass of each bin of one coordinate alone. */
  readonly marginals: { readonly x: Float64Array; readonly y: Float64Array }
  /** One entry per bin of the first coordinate that holds something. */
  readonly conditionalMean: readonly ConditionalMean[]
  readonly coupling: CouplingMap
  /** Null when no cell holds enough to judge. */
  readonly largestCoupling: LargestCoupling | null
  readonly verdictGrid: VerdictGrid
  /** Plug-in value on the verdict grid. */
  readonly mutualInformation: number
  /** Plug-in value on the file's own grid with the Miller–Madow correction; null when the sample size is unknown. */
  readonly mutualInformationMillerMadow: number | null
  /** The number the verdict rests on: plug-in less the mean of the null tables; null when the sample size is unknown. */
  readonly mutualInformationCorrected: number | null
  /** Mean and 99th percentile of the plug-in value over tables with the same margins; null as above. */
  readonly nullMean: number | null
  readonly nullPercentile99: number | null
  /** (1 + number of null tables that reach the measured value) / (1 + number of null tables); null as above. */
  readonly pValue: number | null
  /** Total variation distance between joint and product of marginals on the verdict grid, in [0, 1]. */
  readonly totalVariation: number
  /** What independent data of this size show of it, from the null tables; null when the sample size is unknown. */
  readonly totalVariationNullMean: number | null
  /** Null when one coordinate is a dihedral, which has no order, or does not vary. */
  readonly pearson: number | null
  readonly spearman: number | null
  /** Null when the sample size is unknown, or one coordinate has data in too few bins for a smooth curve. */
  readonly basins: CorrelationBasins | null
  readonly verdict: CorrelationVerdict
  /** The verdict was reached at. */
  readonly thresholds: VerdictThresholds
  readonly warnings: readonly CorrelationWarning[]
}
