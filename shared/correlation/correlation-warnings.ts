import type { CoordinateKind } from '../histogram/histogram'
import type { CorrelationVerdict, CorrelationWarning, VerdictThresholds } from './correlation'
import type { CorrelationBasins } from './correlation-basins'
import type { NullDistribution } from './null-tables'

/** What a reader of the verdict must know beside it. */
export function correlationWarnings(
  kinds: readonly [CoordinateKind, CoordinateKind],
  independentSamples: number | null,
  verdict: CorrelationVerdict,
  chance: NullDistribution | null,
  basins: CorrelationBasins | null,
  { separableBelow, jointAbove }: VerdictThresholds,
): CorrelationWarning[] {
  const warnings: CorrelationWarning[] = []
  if (chance === null) {
    warnings.push({
      code: 'SAMPLE_SIZE_UNKNOWN',
      message:
        'The file holds a density without a number of samples, so nobody can tell its mutual information from noise.',
      action: 'State how many independent samples it stands for, or give the counts.',
    })
  } else if (verdict === 'undecided') {
    const hidden = Number((chance.percentile99 - chance.mean).toPrecision(2))
    const count = Math.round(independentSamples ?? 0)
    warnings.push({
      code: 'TOO_FEW_SAMPLES',
      message:
        `With ${count} independent samples chance alone reaches ${hidden} nats, more than the ${separableBelow} that ` +
        'would still be separable.',
      action: 'Sample longer, or pool chains, before deciding.',
    })
  }
  if (verdict === 'joint' && basins !== null && basins.mapOnly > 0) {
    const { mapOnly, depth } = basins
    warnings.push({
      code: 'BASINS_BEYOND_PRODUCT',
      message:
        `At a depth of ${depth} kT the map has ${mapOnly === 1 ? 'a basin' : `${mapOnly} basins`} that unrelated terms ` +
        `with these distributions would lack: two separate potentials cannot make ${mapOnly === 1 ? 'it' : 'them'}, even ` +
        `where the mutual information stays below ${jointAbove} nats.`,
      action: 'Use a joint potential, or look whether another mapping parts the basins.',
    })
  }
  if (kinds.includes('dihedral')) {
    warnings.push({
      code: 'CIRCULAR_COEFFICIENT',
      message:
        'A dihedral has no first and last value, so Pearson and Spearman coefficients say nothing about it.',
      action: 'Rest on the mutual information and the map.',
    })
  }
  return warnings
}
