import { coordinateFromInternal } from '../units'
import type { FormFit } from './form'
import type { LikelihoodCells } from './likelihood-cells'

/** Pearson's χ² this many of its own deviations above its mean is no accident; as for the smoothed curve. */
const MISFIT_DEVIATIONS = 6

export type FormWarningCode =
  /** No standard errors, no AIC: the number of independent samples is unknown. */
  | 'RANKING_UNKNOWN'
  /** The histogram cuts the distribution off. */
  | 'RANGE_CUT_OFF'
  /** Even the best form misses the histogram by more than noise. */
  | 'NO_FORM_FITS'

/** A doubt about a ranking, for a person. */
export interface FormWarning {
  readonly code: FormWarningCode
  /** What is wrong and why it matters. */
  readonly message: string
  readonly action: string
}

/** What may be wrong with a ranking; `best` is its first fit, null when all forms were refused. */
export function rankingWarnings(cells: LikelihoodCells, best: FormFit | null): FormWarning[] {
  return [...unknownSamples(cells), ...cutOffSides(cells), ...misfit(best)]
}

function unknownSamples({ independentSamples }: LikelihoodCells): FormWarning[] {
  if (independentSamples !== null) return []
  return [
    {
      code: 'RANKING_UNKNOWN',
      message:
        'The file holds no counts and nobody has said how many independent samples it stands for, so the forms have neither standard errors nor AIC and stand in no order.',
      action: 'State the number of independent samples to rank the forms.',
    },
  ]
}

function cutOffSides({ kind, edges, cutOff }: LikelihoodCells): FormWarning[] {
  const places = [edges[0], edges[edges.length - 1]].filter((_, side) => cutOff[side])
  if (places.length === 0) return []
  const text = places.map((edge) =>
    kind === 'bond'
      ? `${Number(edge.toPrecision(4))} nm`
      : `${Number(coordinateFromInternal(edge, 'degree').toFixed(1))}°`,
  )
  return [
    {
      code: 'RANGE_CUT_OFF',
      message: `The histogram ends at ${text.join(' and ')} while it still holds counts; the forms were fitted to its range alone and say less about what lies beyond.`,
      action: 'Bin the distribution over a wider range.',
    },
  ]
}

function misfit(best: FormFit | null): FormWarning[] {
  const goodness = best && best.goodness
  if (best === null || goodness === null) return []
  const { chiSquare, freedom } = goodness
  if ((chiSquare - freedom) / Math.sqrt(2 * freedom) < MISFIT_DEVIATIONS) return []
  return [
    {
      code: 'NO_FORM_FITS',
      message: `Even the best form, ${best.form}, misses the histogram by more than noise: χ² is ${(chiSquare / freedom).toPrecision(2)} per degree of freedom.`,
      action: 'Look at the largest deviation; keep the smoothed curve where it matters.',
    },
  ]
}
