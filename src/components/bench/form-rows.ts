import type { FormName, FormRefusal, RankedFit } from '@shared/forms'
import type { RankingAnswer } from '@/workers'

/** A line of the table of forms; `fit` is null for the smooth curve, the table itself. */
export interface FormRow {
  readonly form: FormName | null
  readonly fit: RankedFit | null
  /** AIC above the least of all lines; null where there is none. */
  readonly deltaAic: number | null
  /** |ΔU| in kT; null for the smooth curve. */
  readonly deviation: number | null
}

/** The fitted forms and the smooth curve by ascending AIC; without AIC the curve first, then the simplest forms. */
export function formRows({ ranking, curveAic }: RankingAnswer): FormRow[] {
  const fits = ranking.candidates.filter((candidate) => candidate.outcome === 'fitted')
  const least = [curveAic, ...fits.map(({ aic }) => aic)].reduce<number>(
    (lowest, aic) => Math.min(lowest, aic ?? Infinity),
    Infinity,
  )
  const above = (aic: number | null): number | null => (aic === null ? null : aic - least)
  const rows: FormRow[] = [
    { form: null, fit: null, deltaAic: above(curveAic), deviation: null },
    ...fits.map((fit) => ({
      form: fit.form,
      fit,
      deltaAic: above(fit.aic),
      deviation: fit.largestDeviation?.value ?? null,
    })),
  ]
  return rows.sort((one, other) => (one.deltaAic ?? -1) - (other.deltaAic ?? -1))
}

/** The forms that do not fit, with their reasons. */
export function refusedForms({ ranking }: RankingAnswer): FormRefusal[] {
  return ranking.candidates.filter((candidate) => candidate.outcome === 'refused')
}
