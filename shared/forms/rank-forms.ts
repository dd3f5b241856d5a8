import { InvalidInputError } from '../errors'
import type { AppliedInefficiency, Histogram } from '../histogram'
import { type Potential, SETTING_LIMITS } from '../inversion'
import type { CoordinateKind } from '../units'
import { fitCells } from './fit-cells'
import type { FormFit, FormName, FormRefusal } from './form'
import { formsOfKind, termLimits } from './form-definitions'
import { likelihoodCells } from './likelihood-cells'
import { type FormWarning, rankingWarnings } from './ranking-warnings'

/** What may be asked of a fit. */
export interface FitOptions {
  /** Number of cosines or Gaussians; null, the default, chooses it by AIC. */
  readonly terms?: number | null
  /** Smooth potential to measure the largest deviation from; null, the default, measures none. */
  readonly reference?: Potential | null
  /** false takes J = 1, for a potential that was made without the Jacobian; true is the default. */
  readonly jacobian?: boolean
  /** Statistical inefficiency g ≥ 1 that counts are divided by; null, the default, takes what the histogram says. */
  readonly inefficiency?: number | null
}

/** What may be asked of a ranking. */
export interface RankOptions extends Omit<FitOptions, 'terms'> {
  /** Numbers of cosines or Gaussians that are given; others are chosen by AIC. */
  readonly terms?: Partial<Readonly<Record<FormName, number>>>
}

/** A fitted form with its place in the ranking. */
export interface RankedFit extends FormFit {
  /** AIC above the least of the ranking, to a thousandth; null when the number of independent samples is unknown. */
  readonly deltaAic: number | null
}

/** All forms of a kind, fitted to one histogram. */
export interface FormRanking {
  readonly kind: CoordinateKind
  /** K */
  readonly temperature: number
  readonly independentSamples: number | null
  /** What counts were divided by; null for a density or a probability. */
  readonly inefficiency: AppliedInefficiency | null
  /** Sides on which the histogram cuts the distribution off; the fits are conditional on the range there. */
  readonly cutOff: readonly [low: boolean, high: boolean]
  /** By ascending AIC, equal ones the simplest first; without AIC the simplest first. Refused forms last. */
  readonly candidates: readonly (RankedFit | FormRefusal)[]
  readonly warnings: readonly FormWarning[]
}

/**
 * Fits all forms of the histogram's kind by maximum likelihood to its effective counts (counts · independent samples /
 * total) and ranks them by AIC (Akaike, IEEE Trans. Autom. Control 19 (1974) 716). The model of a bin is ∫ J exp(−U/kT) dq
 * / Z, so neither the Jacobian nor the bin width biases a parameter. Nothing is chosen: refused forms stay in the list
 * with their reason. Counts without a stated number of independent samples are taken as independent; a density or
 * probability without it has parameters, but neither standard errors, AIC nor goodness, and no number of terms is chosen.
 *
 * @param temperature K
 * @throws {InvalidInputError} TEMPERATURE_INVALID; TOO_FEW_BINS with fewer than 5 filled bins; TOO_FEW_SAMPLES when counts
 *   add up to less than 1; SETTING_INVALID when a number of terms or the inefficiency is outside its limits
 */
export function rankForms(
  histogram: Histogram,
  temperature: number,
  { terms = {}, reference = null, jacobian = true, inefficiency = null }: RankOptions = {},
): FormRanking {
  const { kind } = histogram
  const forms = formsOfKind(kind)
  forms.forEach((form) => checkTerms(form, terms[form] ?? null))
  checkInefficiency(inefficiency)
  const cells = likelihoodCells(histogram, temperature, jacobian, inefficiency)
  const results = forms.map((form) => fitCells(cells, form, terms[form] ?? null, reference))
  const fits = results.filter((result) => result.outcome === 'fitted')
  const least = fits.reduce((lowest, { aic }) => Math.min(lowest, aic ?? Infinity), Infinity)
  const ranked = fits
    .map((fit): RankedFit => ({ ...fit, deltaAic: fit.aic === null ? null : rounded(fit.aic - least) }))
    .sort((one, other) => (one.deltaAic ?? 0) - (other.deltaAic ?? 0))
  return {
    kind,
    temperature,
    independentSamples: cells.independentSamples,
    inefficiency: cells.inefficiency,
    cutOff: cells.cutOff,
    candidates: [...ranked, ...results.filter((result) => result.outcome === 'refused')],
    warnings: rankingWarnings(cells, ranked.at(0) ?? null),
  }
}

/** ΔAIC to a thousandth: the same model in other words differs by rounding only. */
function rounded(deltaAic: number): number {
  return Math.round(deltaAic * 1000) / 1000
}

/**
 * Fits one form; see `rankForms`.
 *
 * @returns the fit, or why there is none
 * @throws {InvalidInputError} as `rankForms`; SETTING_INVALID also when the form does not belong to the kind
 */
export function fitForm(
  histogram: Histogram,
  temperature: number,
  form: FormName,
  { terms = null, reference = null, jacobian = true, inefficiency = null }: FitOptions = {},
): FormFit | FormRefusal {
  if (!formsOfKind(histogram.kind).includes(form)) {
    throw new InvalidInputError(
      'SETTING_INVALID',
      `The forms of a ${histogram.kind} are ${formsOfKind(histogram.kind).join(', ')}, not ${form}.`,
      { field: 'form' },
    )
  }
  checkTerms(form, terms)
  checkInefficiency(inefficiency)
  return fitCells(likelihoodCells(histogram, temperature, jacobian, inefficiency), form, terms, reference)
}

function checkTerms(form: FormName, terms: number | null): void {
  const limits = termLimits(form)
  if (terms === null) return
  if (limits !== null && Number.isInteger(terms) && terms >= limits.least && terms <= limits.most) return
  const allowed = limits === null ? 'has no number of terms' : `has ${limits.least} to ${limits.most} terms`
  throw new InvalidInputError('SETTING_INVALID', `The form ${form} ${allowed}, not ${terms}.`, {
    field: 'terms',
  })
}

function checkInefficiency(inefficiency: number | null): void {
  const { low, high } = SETTING_LIMITS.inefficiency
  if (inefficiency === null || (inefficiency >= low && inefficiency <= high)) return
  throw new InvalidInputError(
    'SETTING_INVALID',
    `The statistical inefficiency must lie between ${low} and ${high}.`,
    { field: 'inefficiency' },
  )
}
