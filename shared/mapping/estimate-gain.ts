import { InvalidInputError } from '../errors'

/** What the estimate assumes; every ratio is coarse-grained to atomistic. */
export interface GainAssumptions {
  /** Cutoff of the interactions between sites that are not bonded. */
  readonly cutoffRatio: number
  /** Time step of the integration. */
  readonly timeStepRatio: number
}

/**
 * Common practice: about the same cutoff, since fewer and larger sites are seen as far; 5 fs against the 1 fs that bonds to
 * hydrogen ask for. Adjustable.
 */
export const DEFAULT_GAIN_ASSUMPTIONS: GainAssumptions = { cutoffRatio: 1, timeStepRatio: 5 }

/** How much less work the same volume over the same time is than with all atoms. An estimate, never measured. */
export interface Gain {
  /** Pairs within the cutoff, atomistic to coarse-grained. */
  readonly pairs: number
  /** Steps for the same time, atomistic to coarse-grained. */
  readonly steps: number
  readonly total: number
  readonly assumptions: GainAssumptions
  /** What was assumed, in sentences. */
  readonly sentences: readonly string[]
}

/**
 * Estimated gain in cost. At one density the pairs within a cutoff go as the number of sites, times the number of sites per
 * volume, times the cutoff cubed: pairs = reduction² / cutoffRatio³ (analytic for a uniform density). Times the ratio of the
 * time steps.
 *
 * @param reduction sites before per site after, such as `MappingNumbers.reduction`; above 0
 * @throws {InvalidInputError} SETTING_INVALID for a number that is not above 0
 * @example estimateGain(9, { cutoffRatio: 1, timeStepRatio: 5 }).total // 405
 */
export function estimateGain(
  reduction: number,
  assumptions: GainAssumptions = DEFAULT_GAIN_ASSUMPTIONS,
): Gain {
  const { cutoffRatio, timeStepRatio } = assumptions
  for (const value of [reduction, cutoffRatio, timeStepRatio]) {
    if (!(value > 0 && Number.isFinite(value))) {
      throw new InvalidInputError('SETTING_INVALID', `A ratio of costs is a number above 0, not ${value}.`)
    }
  }
  const pairs = reduction ** 2 / cutoffRatio ** 3
  return {
    pairs,
    steps: timeStepRatio,
    total: pairs * timeStepRatio,
    assumptions,
    sentences: [
      `Work is taken as the number of pairs within a cutoff of ${cutoffRatio} times the atomistic one, at the same density.`,
      `The time step is taken as ${timeStepRatio} times the atomistic one.`,
      'Charges, bonded terms and the faster motion on a smoother landscape are not counted.',
    ],
  }
}
