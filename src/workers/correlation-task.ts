import { correlate, type Correlation, type VerdictThresholds } from '@shared/correlation'
import { InvalidInputError, type InputPlace, type InvalidInputCode } from '@shared/errors'
import type { JointHistogram } from '@shared/histogram'

/** What came of a joint histogram; a refusal is plain data, since an error class does not survive the way. */
export type CorrelationOutcome =
  | { readonly correlation: Correlation; readonly refusal: null }
  | {
      readonly correlation: null
      readonly refusal: {
        readonly code: InvalidInputCode
        readonly message: string
        readonly place: InputPlace
      }
    }

/** Works out what a joint histogram says, as the server does. */
export function runCorrelation(joint: JointHistogram, thresholds: VerdictThresholds): CorrelationOutcome {
  try {
    return { correlation: correlate(joint, { thresholds }), refusal: null }
  } catch (error) {
    if (!(error instanceof InvalidInputError)) throw error
    const { code, message, place } = error
    return { correlation: null, refusal: { code, message, place } }
  }
}
