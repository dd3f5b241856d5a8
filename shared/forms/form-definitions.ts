import type { CoordinateKind } from '../units'
import { cosineHarmonic } from './cosine-harmonic'
import { cosinePowers, cosineSeries, cosineSeriesPhases } from './cosine-series'
import type { FormName } from './form'
import type { FormDefinition, TermLimits } from './form-definition'
import { gaussians } from './gaussians'
import { harmonic } from './harmonic'
import { morse } from './morse'
import { quartic } from './quartic'

/** All forms, the simplest first. */
export const FORM_DEFINITIONS: Readonly<Record<FormName, FormDefinition>> = {
  harmonic,
  'cosine-harmonic': cosineHarmonic,
  morse,
  quartic,
  'cosine-series': cosineSeries,
  'cosine-powers': cosinePowers,
  'cosine-series-phases': cosineSeriesPhases,
  gaussians,
}

/** Names of all forms. */
export const FORM_NAMES = Object.keys(FORM_DEFINITIONS) as readonly FormName[]

/**
 * Forms that a kind of coordinate may be fitted with, the simplest first.
 *
 * @example formsOfKind('bond') // ['harmonic', 'morse', 'quartic', 'gaussians']
 */
export function formsOfKind(kind: CoordinateKind): readonly FormName[] {
  return FORM_NAMES.filter((form) => FORM_DEFINITIONS[form].kinds.includes(kind))
}

/**
 * Least and greatest number of terms (cosines or Gaussians) of a form; null for a form without such a number.
 *
 * @example termLimits('gaussians') // { least: 1, most: 4, patience: 2 }
 */
export function termLimits(form: FormName): TermLimits | null {
  return FORM_DEFINITIONS[form].terms
}
