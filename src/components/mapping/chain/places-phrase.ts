import type { DerivedTerm } from '@shared/mapping'
import { numberWord } from '../number-words'
import { CHAIN_UNITS } from './chain-layout'

/** What is lit, in words: 'B–B–E at its two places', 'B–B–B–B on the chain, over four units'. */
export function placesPhrase(term: DerivedTerm): string {
  const classes = new Set(term.placeClasses).size
  const where = classes > 1 ? `at its ${numberWord(classes)} places` : 'on the chain'
  const units = Math.max(...term.places.flat().map(({ unit }) => unit)) + 1
  return `${term.name} ${where}${units > CHAIN_UNITS ? `, over ${numberWord(units)} units` : ''}`
}
