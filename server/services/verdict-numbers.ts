import type { VerdictNumbers } from '../../shared/contracts/distribution'
import { correlate, DEFAULT_SEED } from '../../shared/correlation'
import type { JointHistogram } from '../../shared/histogram'

/** The verdict on two terms with the numbers it rests on. */
export function verdictNumbers(joint: JointHistogram): VerdictNumbers {
  const { independentSamples } = joint
  const correlation = correlate(joint, { seed: DEFAULT_SEED, independentSamples })
  const { verdict, mutualInformation, mutualInformationCorrected, nullMean, pValue } = correlation
  return {
    verdict,
    mutualInformation,
    mutualInformationCorrected,
    nullMean,
    pValue,
    independentSamples: correlation.independentSamples,
  }
}
