import { termName } from '../../shared/mapping'
import type { Term } from '../entities/term.entity'

/**
 * The name of a stored term among those of its mapping: the current ones of a split sequence are numbered.
 *
 * @param terms of the mapping in the order of their positions: terms of one sequence follow one another by their numbers
 */
export function storedTermName(term: Term, terms: readonly Term[]): string {
  return termName(term.types, numberOf(term, terms))
}

function numberOf(term: Term, terms: readonly Term[]): number | undefined {
  if (term.placeKey === '' || !term.current) return undefined
  const sequence = term.types.join('\n')
  return terms.filter(({ current, types }) => current && types.join('\n') === sequence).indexOf(term) + 1
}
