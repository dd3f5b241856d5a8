import { type BandedFactor, selectedInverse } from '../numeric'
import { penaltyRanks, type PerAxis } from './tensor-penalty'
import { tensorQuadratic } from './tensor-products'
import { penaltyTraces, type TensorSystem, tensorSums } from './tensor-system'

/** What the Hessian H of a fit says about it. */
export interface TensorEvidence {
  /** Posterior variance of η in each cell, b′H⁻¹b. */
  readonly variances: Float64Array
  /** tr(H⁻¹ B′ diag(μ) B) */
  readonly effectiveDimension: number
  /** Effective parameters each penalty leaves of those it sees: λ tr(S⁻S_m) − λ tr(H⁻¹S_m). */
  readonly excesses: PerAxis<number>
  /** 2 Σ [n ln(n/μ) − (n − μ)] */
  readonly deviance: number
}

/**
 * Reads variances, effective parameters and deviance off a converged fit.
 *
 * @param means μ, one per cell
 * @param lambdas on the coefficients
 * @param factor of H at these means and λ
 */
export function tensorEvidence(
  system: TensorSystem,
  counts: Float64Array,
  means: Float64Array,
  lambdas: PerAxis<number>,
  factor: BandedFactor,
): TensorEvidence {
  const { x, y } = system
  const sums = tensorSums(system, selectedInverse(factor))
  const variances = tensorQuadratic(x.basis, y.basis, sums)
  const ranks = penaltyRanks(x, y, lambdas)
  const traces = penaltyTraces(system, sums)
  let [effectiveDimension, deviance] = [0, 0]
  for (let cell = 0; cell < counts.length; cell++) {
    const [count, mean] = [counts[cell], means[cell]]
    effectiveDimension += mean * variances[cell]
    deviance += 2 * (mean - count + (count > 0 ? count * Math.log(count / mean) : 0))
  }
  return {
    variances,
    effectiveDimension,
    excesses: [ranks[0] - lambdas[0] * traces[0], ranks[1] - lambdas[1] * traces[1]],
    deviance,
  }
}
