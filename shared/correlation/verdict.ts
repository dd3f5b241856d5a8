import type { CorrelationVerdict, VerdictThresholds } from './correlation'
import { SIGNIFICANCE } from './correlation'
import type { NullDistribution } from './null-tables'

/**
 * The verdict on a corrected mutual information and on basins that the product of the marginals lacks: either is enough. A
 * joint potential is advised, or borderline said, only when chance is excluded at the 1 % level. Where it is not, 'separable' needs samples enough that chance alone stays below the
 * separable threshold; with fewer a coupling could hide, and the verdict is 'undecided'.
 *
 * @param measured plug-in value on the verdict grid, in nats
 * @param mapOnly number of basins of the map that the product lacks
 */
export function verdictOf(
  measured: number,
  chance: Pick<NullDistribution, 'mean' | 'percentile99' | 'pValue'>,
  mapOnly: number,
  { separableBelow, jointAbove }: VerdictThresholds,
): CorrelationVerdict {
  const corrected = measured - chance.mean
  const significant = chance.pValue < SIGNIFICANCE && measured > chance.percentile99
  if (significant) {
    if (corrected >= jointAbove || mapOnly > 0) return 'joint'
    return corrected >= separableBelow ? 'borderline' : 'separable'
  }
  const couldHide = chance.percentile99 - chance.mean
  return couldHide < separableBelow && corrected < separableBelow ? 'separable' : 'undecided'
}
