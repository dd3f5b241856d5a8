import type { Potential } from '../inversion'
import type { FormFit, FormName, FormRefusal, FormRefusalCode, TriedTerms } from './form'
import type { FormDefinition, FormSolution, TermLimits } from './form-definition'
import { FORM_DEFINITIONS } from './form-definitions'
import { akaike, fitRecord } from './fit-record'
import type { LikelihoodCells } from './likelihood-cells'
import { RefusedForm } from './refused-form'

/**
 * Fits one form to cells.
 *
 * @param terms number of cosines or Gaussians; null chooses it by AIC
 * @param reference potential that the largest deviation is taken from, or null
 */
export function fitCells(
  cells: LikelihoodCells,
  form: FormName,
  terms: number | null,
  reference: Potential | null,
): FormFit | FormRefusal {
  const definition = FORM_DEFINITIONS[form]
  const limits = definition.terms
  try {
    if (limits === null)
      return fitRecord(cells, definition, 0, solve(cells, definition, 0, null), reference, [])
    if (terms !== null) {
      const solution = upTo(cells, definition, [limits.least, terms]).at(-1)?.result
      if (solution instanceof RefusedForm) throw solution
      if (solution !== undefined) return fitRecord(cells, definition, terms, solution, reference, [])
    }
    return chosenByAic(cells, definition, limits, reference)
  } catch (error) {
    if (error instanceof RefusedForm) return refusal(cells, form, terms, error)
    throw error
  }
}

interface Trial {
  readonly terms: number
  readonly result: FormSolution | RefusedForm
}

/** Fits with ascending numbers of terms, each from the one before; `enough` may end the search early. */
function upTo(
  cells: LikelihoodCells,
  definition: FormDefinition,
  [least, most]: readonly [number, number],
  enough: (trials: readonly Trial[]) => boolean = () => false,
): Trial[] {
  const trials: Trial[] = []
  let smaller: FormSolution | null = null
  for (let terms = least; terms <= most && !enough(trials); terms++) {
    const result = attempt(() => solve(cells, definition, terms, smaller))
    if (!(result instanceof RefusedForm)) smaller = result
    trials.push({ terms, result })
  }
  return trials
}

function attempt(fit: () => FormSolution): FormSolution | RefusedForm {
  try {
    return fit()
  } catch (error) {
    if (error instanceof RefusedForm) return error
    throw error
  }
}

function chosenByAic(
  cells: LikelihoodCells,
  definition: FormDefinition,
  { least, most, patience }: TermLimits,
  reference: Potential | null,
): FormFit {
  const { independentSamples } = cells
  if (independentSamples === null) {
    throw new RefusedForm(
      'SAMPLE_SIZE_UNKNOWN',
      'The number of terms cannot be chosen without a sample size: give it, or state the number of independent samples.',
    )
  }
  const aicOf = ({ terms, result }: Trial) =>
    result instanceof RefusedForm ? null : akaike(definition, terms, result, independentSamples)
  const lowest = (trials: readonly Trial[]) =>
    trials.reduce((best, trial, index) => {
      const [aic, least] = [aicOf(trial), best < 0 ? null : aicOf(trials[best])]
      return aic !== null && (least === null || aic < least) ? index : best
    }, -1)
  const trials = upTo(
    cells,
    definition,
    [least, most],
    (made) => patience !== null && lowest(made) >= 0 && made.length - 1 - lowest(made) >= patience,
  )
  const best = trials[Math.max(0, lowest(trials))]
  if (best.result instanceof RefusedForm) throw best.result
  const tried = trials.map((trial): TriedTerms => ({ terms: trial.terms, aic: aicOf(trial) }))
  return fitRecord(cells, definition, best.terms, best.result, reference, tried)
}

function solve(
  cells: LikelihoodCells,
  definition: FormDefinition,
  terms: number,
  smaller: FormSolution | null,
): FormSolution {
  const parameters = definition.freeParameters(terms)
  if (cells.filledBins <= parameters) {
    throw new RefusedForm(
      'TOO_FEW_BINS',
      `Only ${cells.filledBins} bins hold data; ${parameters} parameters need at least ${parameters + 1}.`,
    )
  }
  return definition.fit(cells, terms, smaller)
}

function refusal(
  { kind }: LikelihoodCells,
  form: FormName,
  terms: number | null,
  { code, message }: { code: FormRefusalCode; message: string },
): FormRefusal {
  return { outcome: 'refused', form, kind, terms, code, message }
}
