import type { Inversion } from '../inversion'
import { thermalEnergy } from '../units'
import type { FormFit, LargestDeviation } from './form'
import { energyOf } from './form-energy'
import { largestDeviation } from './largest-deviation'
import type { FormRanking } from './rank-forms'

/**
 * Where a form differs most from a smooth inversion of the same histogram; see `largestDeviation`.
 *
 * @returns null when no bin qualifies
 */
export function formDeviation(fit: FormFit, smooth: Inversion): LargestDeviation | null {
  const { bins, potential, temperature } = smooth
  const { edges, volumes } = bins
  const cells = { edges, volumes, populated: potential.populated, kT: thermalEnergy(temperature) }
  return largestDeviation(cells, energyOf(fit), potential)
}

/**
 * A ranking with the largest deviation of each fit from a smooth inversion: all of it that depends on the smoothing, so that a
 * ranking is made once and compared again whenever λ moves.
 */
export function comparedRanking(ranking: FormRanking, smooth: Inversion): FormRanking {
  return {
    ...ranking,
    candidates: ranking.candidates.map((candidate) =>
      candidate.outcome === 'fitted'
        ? { ...candidate, largestDeviation: formDeviation(candidate, smooth) }
        : candidate,
    ),
  }
}

/**
 * AIC of the smooth curve on the scale of the forms: 2 (effective dimension − 1) − 2 Σ n ln π over effective counts, π the
 * regenerated probabilities (Hastie & Tibshirani, Generalized Additive Models (1990) §6.8; Eilers & Marx, Stat. Sci. 11 (1996)
 * 89). The dimension counts the level of the counts, which probabilities do not have.
 *
 * @returns null without smoothing or without a number of independent samples
 */
export function curveAic({ bins, regenerated, smoothing, independentSamples }: Inversion): number | null {
  const { effectiveDimension } = smoothing
  if (effectiveDimension === null || independentSamples === null) return null
  const total = bins.weights.reduce((sum, weight) => sum + weight, 0)
  const logLikelihood = bins.weights.reduce(
    (sum, weight, bin) =>
      weight > 0 ? sum + (weight / total) * independentSamples * Math.log(regenerated[bin]) : sum,
    0,
  )
  return 2 * (effectiveDimension - 1) - 2 * logLikelihood
}
