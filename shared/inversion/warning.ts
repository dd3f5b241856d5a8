/**
 * What may be wrong with a result although it could be computed. Stable: tests, the API and the command line compare
 * codes, never messages.
 */
export type WarningCode =
  | 'SAMPLE_SIZE_UNKNOWN'
  | 'FEW_SAMPLES'
  | 'SLOPE_AT_STRAIGHT_ANGLE'
  | 'DATA_AT_EDGE'
  | 'TURN_INCOMPLETE'
  | 'GAPS_BRIDGED'
  | 'CURVE_MISSES_DATA'
  | 'EXTRAPOLATION_DOMINATES'
  | 'TABLE_CUTS_DATA'
  | 'TABLE_TOO_COARSE'
  | 'CAP_IN_DATA'

/** A doubt about a result, for a person. */
export interface Warning {
  readonly code: WarningCode
  /** What is wrong and why it matters, with the number it rests on. */
  readonly message: string
  /** What to do about it. */
  readonly action: string
}
