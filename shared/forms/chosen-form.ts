import { InvalidInputError } from '../errors'
import type { Histogram } from '../histogram'
import type { InversionSettings } from '../inversion'
import type { FormFit, FormName } from './form'
import { FORM_NAMES } from './form-definitions'
import { formCurve, type FormCurve } from './form-potential'
import { fitForm } from './rank-forms'

/** The form that settings ask for, fitted, and as a potential. It does not depend on the smoothing. */
export interface ChosenForm extends FormCurve {
  readonly fit: FormFit
}

/**
 * Fits the form that the settings name, with its number of terms chosen by AIC.
 *
 * @returns null when they name none
 * @throws {InvalidInputError} SETTING_INVALID with field form for a form that is unknown, does not belong to the kind or does
 *   not fit; else as `fitForm`
 */
export function fitChosenForm(
  histogram: Histogram,
  temperature: number,
  { form, jacobian, inefficiency, table }: InversionSettings,
): ChosenForm | null {
  if (form === null) return null
  if (!isFormName(form)) throw refuse(`There is no form called ${form}.`)
  const fit = fitForm(histogram, temperature, form, { jacobian, inefficiency })
  if (fit.outcome === 'refused') throw refuse(`The form ${form} does not fit: ${fit.message}`)
  const [low, high] = fit.populated
  return { fit, ...formCurve(fit, [table.low ?? low, table.high ?? high]) }
}

function isFormName(name: string): name is FormName {
  return FORM_NAMES.some((form) => form === name)
}

function refuse(message: string): InvalidInputError {
  return new InvalidInputError('SETTING_INVALID', message, { field: 'form' })
}
