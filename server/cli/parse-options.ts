import { InvalidArgumentError } from 'commander'
import type { SmoothingSettings } from '../../shared/inversion'

/** One word out of a list. */
export function oneOf<Word extends string>(words: readonly Word[]): (text: string) => Word {
  return (text) => {
    const found = words.find((word) => word === text)
    if (found === undefined) throw new InvalidArgumentError(`Choose one of ${words.join(', ')}.`)
    return found
  }
}

/** Two words out of a list, separated by a comma. */
export function pairOf<Word extends string>(words: readonly Word[]): (text: string) => [Word, Word] {
  const pick = oneOf(words)
  return (text) => {
    const parts = text.split(',')
    if (parts.length !== 2) throw new InvalidArgumentError('Give two words separated by a comma.')
    return [pick(parts[0].trim()), pick(parts[1].trim())]
  }
}

/** A finite number in plain or exponent notation. */
export function number(text: string): number {
  const value = Number(text)
  if (text.trim() === '' || !Number.isFinite(value)) throw new InvalidArgumentError('Give a number.')
  return value
}

/** A finite number above 0. */
export function positiveNumber(text: string): number {
  const value = number(text)
  if (value <= 0) throw new InvalidArgumentError('Give a number above 0.')
  return value
}

/** A number from `low` to `high`. */
export function numberWithin(low: number, high: number): (text: string) => number {
  return (text) => {
    const value = number(text)
    if (value < low || value > high) throw new InvalidArgumentError(`Give a number from ${low} to ${high}.`)
    return value
  }
}

/** A whole number of at least `least`. */
export function wholeNumber(least: number): (text: string) => number {
  return (text) => {
    const value = number(text)
    if (!Number.isInteger(value) || value < least) {
      throw new InvalidArgumentError(`Give a whole number of at least ${least}.`)
    }
    return value
  }
}

/** Two whole numbers from `least` to `most`, separated by a comma. */
export function rowPair(least: number, most: number): (text: string) => [number, number] {
  return (text) => {
    const values = text.split(',').map(number)
    if (
      values.length !== 2 ||
      !values.every((each) => Number.isInteger(each) && each >= least && each <= most)
    ) {
      throw new InvalidArgumentError(`Give two whole numbers from ${least} to ${most} separated by a comma.`)
    }
    return [values[0], values[1]]
  }
}

/** 'auto', 'off' or λ. */
export function smoothing(text: string): SmoothingSettings {
  if (text === 'auto') return { mode: 'auto', criterion: 'likelihood' }
  if (text === 'off') return { mode: 'off' }
  const lambda = Number(text)
  if (text.trim() === '' || !Number.isFinite(lambda) || lambda <= 0) {
    throw new InvalidArgumentError('Give auto, off, or λ as a number above 0.')
  }
  return { mode: 'manual', log10Lambda: Math.log10(lambda) }
}
