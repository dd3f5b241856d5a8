import type { BinContent } from '../histogram/histogram'

/** A guess and, for the user, what it rests on. */
export interface ValueGuess {
  readonly value: BinContent
  readonly reason: string
}

/** A sum this close to 1 is a normalised one, printed digits and cut tails allowed for. */
const NORMALISED = 0.02

/**
 * Guesses what a column of values is. Its name decides where it says something; else whole numbers are counts, values
 * that sum to 1 are probabilities, and anything else is a density.
 *
 * @param values of the column; NaN where a field holds no number
 * @param name of the column, or null
 */
export function guessValue(values: Float64Array, name: string | null): ValueGuess {
  const named = name === null ? null : valueOfName(name)
  if (named !== null)
    return { value: named, reason: `The column is called “${name}”: ${withArticle(named)}.` }
  if (values.every(Number.isInteger) && values.some((value) => value > 1)) {
    return { value: 'count', reason: 'The values are whole numbers: counts.' }
  }
  const sum = values.reduce((total, value) => total + value, 0)
  if (Math.abs(sum - 1) < NORMALISED) {
    return { value: 'probability', reason: `The values sum to ${Number(sum.toPrecision(4))}: probabilities.` }
  }
  return { value: 'density', reason: 'The values are neither whole numbers nor do they sum to 1: a density.' }
}

function valueOfName(name: string): BinContent | null {
  if (/count|freq|^#?n$|^n[([_]|hits|samples/i.test(name)) return 'count'
  if (/dens|pdf/i.test(name)) return 'density'
  if (/prob|mass|fraction/i.test(name)) return 'probability'
  return null
}

function withArticle(value: BinContent): string {
  return value === 'count' ? 'counts' : value === 'density' ? 'a density' : 'probabilities'
}
