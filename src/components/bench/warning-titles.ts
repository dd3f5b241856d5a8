import type { Warning, WarningCode } from '@shared/inversion'

/** What a warning is called in three or four words; its sentence with the number stands under it. */
export const WARNING_TITLES: Readonly<Record<WarningCode, string>> = {
  SAMPLE_SIZE_UNKNOWN: 'Sample size not stated',
  COUNTS_TAKEN_AS_INDEPENDENT: 'Counts taken as independent',
  FEW_SAMPLES: 'Few independent samples',
  UNIT_DOUBTFUL: 'Perhaps another unit',
  BOND_AT_ZERO: 'Lengths down to zero',
  BINS_UNEQUAL: 'Bins of very unequal width',
  BINS_TOO_WIDE: 'Bins wider than a well',
  JACOBIAN_OFF: 'The Jacobian is left out',
  JACOBIAN_TWICE: 'Jacobian perhaps divided twice',
  DIHEDRAL_NEAR_STRAIGHT: 'An angle is often straight',
  SLOPE_AT_STRAIGHT_ANGLE: 'Potential still slopes at 180°',
  DATA_AT_EDGE: 'Data touch the edge of the histogram',
  TURN_INCOMPLETE: 'Part of the turn was not measured',
  GAPS_BRIDGED: 'Gaps in the data are bridged',
  BARRIER_UNSAMPLED: 'A barrier without samples',
  CURVE_MISSES_DATA: 'The curve misses the data',
  FORM_MISSES_DATA: 'The form misses the data',
  EXTRAPOLATION_DOMINATES: 'More is extrapolated than measured',
  TABLE_CUTS_DATA: 'The table cuts off data',
  TABLE_TOO_COARSE: 'The table is too coarse',
  CAP_IN_DATA: 'The cap lies in the data',
}

/** Where on the axis warnings point, in internal units: at the straight angle, or at the ends of the data. */
export function warningPlaces(
  warnings: readonly Pick<Warning, 'code'>[],
  edges: ArrayLike<number>,
  weights: ArrayLike<number>,
): number[] {
  const last = weights.length - 1
  return warnings.flatMap(({ code }) => {
    if (code === 'SLOPE_AT_STRAIGHT_ANGLE') return [Math.PI]
    if (code !== 'DATA_AT_EDGE') return []
    return [...(weights[0] > 0 ? [edges[0]] : []), ...(weights[last] > 0 ? [edges[last + 1]] : [])]
  })
}
