import type { VerdictNumbers } from '../../shared/contracts/distribution'
import { correlate, DEFAULT_SEED, verdictOf, type VerdictThresholds } from '../../shared/correlation'
import type { JointHistogram } from '../../shared/histogram'

/** The verdict on two terms with the numbers it rests on. */
export function verdictNumbers(joint: JointHistogram, thresholds: VerdictThresholds): VerdictNumbers {
  const { independentSamples } = joint
  const correlation = correlate(joint, { seed: DEFAULT_SEED, independentSamples, thresholds })
  const { verdict, mutualInformation, mutualInformationCorrected, nullMean, pValue } = correlation
  return {
    verdict,
    mutualInformation,
    mutualInformationCorrected,
    nullMean,
    pValue,
    independentSamples: correlation.independentSamples,
    nullPercentile99: correlation.nullPercentile99,
    basinsBeyondProduct: correlation.basins?.mapOnly ?? null,
  }
}

/** Stored numbers with the verdict they give at thresholds that may have been set since. */
export function verdictAt(numbers: VerdictNumbers, thresholds: VerdictThresholds): VerdictNumbers {
  const { mutualInformation, nullMean, nullPercentile99, pValue, basinsBeyondProduct } = numbers
  if (nullMean === null || pValue === null || nullPercentile99 === null || nullPercentile99 === undefined) {
    return numbers
  }
  const chance = { mean: nullMean, percentile99: nullPercentile99, pValue }
  return { ...numbers, verdict: verdictOf(mutualInformation, chance, basinsBeyondProduct ?? 0, thresholds) }
}
