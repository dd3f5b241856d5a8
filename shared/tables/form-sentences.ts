import { type FormFit, parametersInUnits } from '../forms'
import { coordinateFromInternal, unitWord } from '../units'
import { formatNumber } from './format-number'
import type { TableUnits } from './table'

const LETTERS: Readonly<Record<string, string>> = {
  θ: 'theta',
  φ: 'phi',
  ψ: 'psi',
  δ: 'delta',
  Å: 'angstrom',
  '½': '1/2',
  '−': '-',
  '°': ' deg',
  '²': '^2',
  '³': '^3',
  '⁴': '^4',
  '⁵': '^5',
}

/**
 * A formula or unit in the letters of a text file.
 *
 * @example plainLetters('U = ½ k (θ − θ0)²') // 'U = 1/2 k (theta - theta0)^2'
 */
export function plainLetters(text: string): string {
  return text.replace(/[θφψδÅ½−°²³⁴⁵]/g, (letter) => LETTERS[letter]).replace(/ {2,}/g, ' ')
}

/** Parameters with standard errors and units, such that the formula gives the rows in the units of the table. */
export function parameterSentence(form: FormFit, { coordinateUnit, energyUnit }: TableUnits): string {
  return parametersInUnits(form, coordinateUnit, energyUnit)
    .map(({ name, value, standardError, unit, atBound }) => {
      const error = standardError === null ? '' : ` (standard error ${Number(standardError.toPrecision(2))})`
      const bound = atBound ? ' (held at the end of its domain)' : ''
      return plainLetters(`${name} = ${formatNumber(value)}${unit === '' ? '' : ` ${unit}`}${error}${bound}`)
    })
    .map((text) => text.trim())
    .join('; ')
}

/** By how much the form differs from the smoothed curve where the data live; null where nothing was compared. */
export function deviationSentence(
  { largestDeviation }: FormFit,
  { coordinateUnit }: TableUnits,
): string | null {
  if (largestDeviation === null) return null
  const place = Number(coordinateFromInternal(largestDeviation.coordinate, coordinateUnit).toPrecision(4))
  return `by up to ${Number(largestDeviation.value.toPrecision(2))} kT from the smoothed curve where the data live, at ${place} ${unitWord(coordinateUnit)}`
}
