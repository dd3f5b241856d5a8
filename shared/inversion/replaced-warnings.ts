import { thermalEnergy } from '../units'
import { slopeAtStraightAngle } from './edge-warnings'
import type { Inversion } from './inversion'
import { tableWarnings } from './table-warnings'
import type { Warning, WarningCode } from './warning'

/** Doubts that rest on the potential or on the smooth curve in the table: they say nothing about another one. */
const OF_THE_CURVE: readonly WarningCode[] = [
  'SLOPE_AT_STRAIGHT_ANGLE',
  'GAPS_BRIDGED',
  'CURVE_MISSES_DATA',
  'EXTRAPOLATION_DOMINATES',
  'TABLE_CUTS_DATA',
  'TABLE_TOO_COARSE',
  'CAP_IN_DATA',
]

/**
 * Warnings of an inversion whose potential was replaced by an analytic form: those about samples and histogram stay, those
 * about the table and the slope at 180° are judged anew.
 *
 * @param inversion with the new potential and the warnings of the old one
 * @throws {InvalidInputError} SETTING_INVALID when the table settings are outside the domain
 */
export function replacedWarnings(inversion: Inversion): Warning[] {
  const kT = thermalEnergy(inversion.temperature)
  return [
    ...inversion.warnings.filter(({ code }) => !OF_THE_CURVE.includes(code)),
    ...slopeAtStraightAngle(inversion, kT).map((warning) => ({
      ...warning,
      action: 'Choose a form in cos θ, which is level at 180°, or the table itself.',
    })),
    ...tableWarnings(inversion, kT),
  ]
}
