import type { DerivedTerm } from '@shared/mapping'
import { CHAIN_UNITS } from './chain-layout'

const NUMBERS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten']
const ORDINALS = ['', 'first', 'second', 'third', 'fourth', 'fifth', 'sixth', 'seventh']

/** What is lit, in words: 'B–B–E at its two places', 'B–B on the chain'. */
export function placesPhrase(term: DerivedTerm, beyond: boolean): string {
  const classes = new Set(term.placeClasses).size
  const where = classes > 1 ? `at its ${NUMBERS[classes] ?? classes} places` : 'on the chain'
  const span = Math.max(...term.places.flat().map(({ unit }) => unit)) + 1
  const last = ORDINALS[span] ?? `${span}th`
  return `${term.name} ${where}${beyond && span > CHAIN_UNITS ? `, reaching into a ${last} unit` : ''}`
}
