/**
 * What may be wrong with a result although it could be computed. Stable: tests, the API and the command line compare
 * codes, never messages.
 */
export type WarningCode =
  | 'SAMPLE_SIZE_UNKNOWN'
  | 'COUNTS_TAKEN_AS_INDEPENDENT'
  | 'FEW_SAMPLES'
  | 'UNIT_DOUBTFUL'
  | 'BOND_AT_ZERO'
  | 'BINS_UNEQUAL'
  | 'BINS_TOO_WIDE'
  | 'JACOBIAN_OFF'
  | 'JACOBIAN_TWICE'
  | 'DIHEDRAL_NEAR_STRAIGHT'
  | 'SLOPE_AT_STRAIGHT_ANGLE'
  | 'DATA_AT_EDGE'
  | 'TURN_INCOMPLETE'
  | 'GAPS_BRIDGED'
  | 'BARRIER_UNSAMPLED'
  | 'CURVE_MISSES_DATA'
  | 'FORM_MISSES_DATA'
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
