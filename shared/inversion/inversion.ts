import type { AppliedInefficiency } from '../histogram'
import type { CoordinateKind } from '../units'
import type { InversionSettings, SmoothingCriterion } from './inversion-settings'
import type { Potential } from './potential'
import type { Warning } from './warning'

/** The histogram as the inversion saw it, bin by bin; internal units. */
export interface InvertedBins {
  /** Length n + 1. */
  readonly edges: Float64Array
  readonly midpoints: Float64Array
  /** Where the raw energies belong: Jacobian-weighted centroids, or midpoints with the Jacobian off. */
  readonly centroids: Float64Array
  /** Counts or probability masses, as given. */
  readonly weights: Float64Array
  /** Exact volumes ∫ J dq, or widths with the Jacobian off. */
  readonly volumes: Float64Array
  /** −kT ln(n/V) in kJ/mol, least value 0; NaN for an empty bin. */
  readonly rawEnergies: Float64Array
  /**
   * Standard deviation of U − U_min of the curve at each bin in kJ/mol; NaN where the curve is extrapolated or bridged;
   * null when the number of independent samples is unknown.
   */
  readonly deviations: Float64Array | null
}

/** How the curve was smoothed; null where the mode has no such number. */
export interface SmoothingResult {
  readonly mode: 'auto' | 'off' | 'manual'
  readonly criterion: SmoothingCriterion | null
  /** Per bin index, on counts divided by the statistical inefficiency. */
  readonly lambda: number | null
  readonly log10Lambda: number | null
  readonly effectiveDimension: number | null
}

/** A Boltzmann inversion with the evidence beside it; internal units (nm, rad, kJ/mol, K). */
export interface Inversion {
  readonly kind: CoordinateKind
  readonly temperature: number
  readonly jacobian: boolean
  readonly settings: InversionSettings
  readonly bins: InvertedBins
  /** −kT ln(n/width) in kJ/mol, least value 0, NaN for an empty bin: what leaving the Jacobian out would give. */
  readonly uncorrectedEnergies: Float64Array
  readonly potential: Potential
  /** Add to `bins.rawEnergies` to lay them over the potential: both then have the same constant. */
  readonly rawOffset: number
  /** Probability mass of each bin under the potential, sum 1. */
  readonly regenerated: Float64Array
  readonly smoothing: SmoothingResult
  /** Where the potential is least, and that least energy: 0. */
  readonly minimum: { readonly coordinate: number; readonly energy: number }
  readonly independentSamples: number | null
  /** What the counts were divided by and who says so; null for a density or a probability. */
  readonly inefficiency: AppliedInefficiency | null
  readonly warnings: readonly Warning[]
  /** Worth knowing, but no doubt about this very result: counts that were taken as independent. */
  readonly notes: readonly Warning[]
}
