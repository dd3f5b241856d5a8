import type { Inversion } from '@shared/inversion'

/**
 * By how many of its own errors each bin differs from the regenerated distribution: (n_i − N p_i) / √(N p_i), with n_i the
 * counts divided by the statistical inefficiency, N the number of independent samples and p_i the regenerated probability
 * of the bin. About one in twenty lies beyond ±2 where the curve is right; since the curve was fitted to the same bins,
 * rather fewer do. Source: Pearson residuals of Poisson counts, McCullagh & Nelder, Generalized Linear Models (1989) §2.4,
 * from memory.
 *
 * @returns length n; NaN where nothing is expected; null when the number of independent samples is unknown
 */
export function pearsonResiduals({
  bins,
  regenerated,
  independentSamples,
}: Pick<Inversion, 'bins' | 'regenerated' | 'independentSamples'>): Float64Array | null {
  if (independentSamples === null) return null
  const total = bins.weights.reduce((sum, weight) => sum + weight, 0)
  return bins.weights.map((weight, bin) => {
    const expected = regenerated[bin] * independentSamples
    if (!(expected > 0)) return NaN
    return ((weight / total) * independentSamples - expected) / Math.sqrt(expected)
  })
}
