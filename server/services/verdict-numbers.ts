import type { VerdictNumbers } from '../../shared/contracts/distribution'
import { correlate } from '../../shared/correlation'
import type { JointHistogram } from '../../shared/histogram'

/** Seed of the null tables: the same everywhere, so that a verdict is the same wherever it is worked out. */
const SEED = 1

/** The verdict on two terms with the numbers it rests on. */
export function verdictNumbers(joint: JointHistogram): VerdictNumbers {
  const { independentSamples } = joint
  const correlation = correlate(joint, { seed: SEED, independentSamples })
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
