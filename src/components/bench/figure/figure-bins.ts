import type { Inversion } from '@shared/inversion'
import { measuredHeights } from '@/components/figure/measured-heights'
import { pearsonResiduals } from './pearson-residuals'

/** What the figure knows of each bin, in the units shown; all of length n, edges n + 1. */
export interface FigureBins {
  readonly edges: Float64Array
  readonly midpoints: Float64Array
  /** Counts, or probability masses where the file held no counts. */
  readonly weights: Float64Array
  /** Mean of the measured density over the bin. */
  readonly measured: Float64Array
  /** Mean of the regenerated density over the bin. */
  readonly regenerated: Float64Array
  /** In units of their error, see `pearsonResiduals`; null when the number of independent samples is unknown. */
  readonly residuals: Float64Array | null
  /** Where the bin by bin energy belongs. */
  readonly centroids: Float64Array
  /** Bin by bin energies laid over the potential; NaN without counts. */
  readonly energies: Float64Array
}

/**
 * Bins of an inversion in the units shown.
 *
 * @param shown takes a coordinate to the unit shown
 * @param densityFactor 100 where densities are shown in per cent
 * @param energyFactor one kJ/mol in the unit shown
 */
export function figureBins(
  inversion: Inversion,
  shown: (coordinate: number) => number,
  densityFactor: number,
  energyFactor: number,
): FigureBins {
  const { bins, rawOffset, regenerated } = inversion
  const edges = bins.edges.map(shown)
  return {
    edges,
    midpoints: bins.midpoints.map(shown),
    weights: bins.weights,
    measured: measuredHeights(bins.weights, edges, densityFactor),
    regenerated: measuredHeights(regenerated, edges, densityFactor),
    residuals: pearsonResiduals(inversion),
    centroids: bins.centroids.map(shown),
    energies: bins.rawEnergies.map((energy) => (energy + rawOffset) * energyFactor),
  }
}
