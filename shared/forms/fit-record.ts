import type { Potential } from '../inversion'
import type { FormFit, TriedTerms } from './form'
import type { FormDefinition, FormSolution } from './form-definition'
import { goodnessOfFit } from './goodness'
import { largestDeviation } from './largest-deviation'
import type { LikelihoodCells } from './likelihood-cells'

/** AIC of a solution: 2 × free parameters − 2 × log-likelihood (Akaike, IEEE Trans. Autom. Control 19 (1974) 716). */
export function akaike(
  definition: FormDefinition,
  terms: number,
  { maximum }: FormSolution,
  independentSamples: number,
): number {
  return 2 * definition.freeParameters(terms) - 2 * independentSamples * maximum.value
}

/** A solution as the record that leaves this folder. */
export function fitRecord(
  cells: LikelihoodCells,
  definition: FormDefinition,
  terms: number,
  solution: FormSolution,
  reference: Potential | null,
  tried: readonly TriedTerms[],
): FormFit {
  const { kind, temperature, kT, independentSamples } = cells
  const { values, maximum, atBound } = solution
  const size = values.length
  const freeParameters = definition.freeParameters(terms)
  const covariance =
    independentSamples === null ? null : solution.covariance.map((entry) => entry / independentSamples)
  const energy = (coordinate: number) => definition.energy(values, coordinate, kT)
  return {
    outcome: 'fitted',
    form: definition.form,
    kind,
    temperature,
    terms: definition.terms && terms,
    formula: definition.formula(kind, terms),
    parameters: definition.parameters(kind, terms).map(({ name, dimension }, index) => ({
      name,
      value: values[index],
      standardError:
        covariance === null || atBound[index] ? null : Math.sqrt(covariance[index * size + index]),
      dimension,
      atBound: atBound[index],
    })),
    covariance,
    freeParameters,
    logLikelihood: independentSamples && independentSamples * maximum.value,
    aic: independentSamples && akaike(definition, terms, solution, independentSamples),
    goodness: goodnessOfFit(cells, maximum.probabilities, freeParameters),
    largestDeviation: reference && largestDeviation(cells, energy, reference),
    independentSamples,
    tried,
    populated: cells.populated,
    variance: cells.deviation ** 2,
  }
}
