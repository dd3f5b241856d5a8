import type { FormFit, FormName } from '@shared/forms'
import type { CoordinateKind } from '@shared/units'

const NAMES: Record<FormName, string> = {
  harmonic: 'harmonic',
  'cosine-harmonic': 'cosine-harmonic',
  morse: 'Morse',
  quartic: 'quartic',
  'cosine-series': 'cosine series',
  'cosine-powers': 'cosine powers',
  'cosine-series-phases': 'cosines with phases',
  gaussians: 'Gaussians',
}
const NUMBERS = ['no', 'one', 'two', 'three', 'four', 'five', 'six']
const JACOBIANS: Record<CoordinateKind, string> = { bond: 'p/r²', angle: 'p/sin θ', dihedral: 'p' }

/** A form without its number of terms. */
export function formName(form: FormName): string {
  return NAMES[form]
}

/** A fitted form in a few words: "two Gaussians in p/sin θ", "cosine series, 3 terms". */
export function formWords({ form, kind, terms }: Pick<FormFit, 'form' | 'kind' | 'terms'>): string {
  if (terms === null) return NAMES[form]
  if (form === 'cosine-series-phases') return `${NAMES[form]}, ${terms}`
  if (form !== 'gaussians') return `${NAMES[form]}, ${terms} ${terms === 1 ? 'term' : 'terms'}`
  return `${NUMBERS[terms]} ${terms === 1 ? 'Gaussian' : 'Gaussians'} in ${JACOBIANS[kind]}`
}
