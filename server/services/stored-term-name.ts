import { termName } from '../../shared/mapping'
import type { Term } from '../entities/term.entity'

/**
 * The name of a stored term among those of its mapping: the current ones of a split sequence are numbered.
 *
 * @param terms of the mapping in the order of their positions: terms of one sequence follow one another by their numbers
 */
export function storedTermName(term: Term, terms: readonly Term[]): string {
  return termName(term.types, placeNumber(term, terms))
}

/**
 * Which of the terms of its sequence a stored term is, from 1; undefined where all places of the sequence are pooled. The number
 * follows from what surrounds the places: it stays while the beads stay, whatever their order.
 *
 * @param terms as for `storedTermName`
 */
export function placeNumber(term: Term, terms: readonly Term[]): number | undefined {
  if (term.placeKey === '' || !term.current) return undefined
  const sequence = term.types.join('\n')
  return terms.filter(({ current, types }) => current && types.join('\n') === sequence).indexOf(term) + 1
}
