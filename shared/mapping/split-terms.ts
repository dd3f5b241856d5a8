import type { MappingDocument, TermPooling } from './mapping-document'
import { placeKey, termName, type DerivedTerm } from './term'

/**
 * What the document says about pooling the places of a type sequence.
 *
 * @param types in canonical direction
 * @returns undefined where nobody decided
 */
export function poolingOf(document: MappingDocument, types: readonly string[]): TermPooling | undefined {
  return document.poolings?.find((pooling) => pooling.types.join('\n') === types.join('\n'))
}

/**
 * Splits the terms that the document wants split: one for each class of places, numbered from 1 by what surrounds the places,
 * so that the numbers do not depend on the order of beads or atoms or the direction of the unit. A sequence whose places are
 * all of one class stays one term.
 *
 * @param terms with all places pooled
 */
export function splitTerms(terms: readonly DerivedTerm[], document: MappingDocument): DerivedTerm[] {
  return terms.flatMap((term) =>
    poolingOf(document, term.types)?.choice === 'split' ? partsOf(term) : [term],
  )
}

/**
 * The terms that a term falls into when its places are told apart.
 *
 * @param term with all places pooled
 * @returns the term itself when its places are all of one class
 */
export function partsOf(term: DerivedTerm): DerivedTerm[] {
  const classes = [...new Set(term.placeClasses)].sort((a, b) => a - b)
  if (classes.length < 2) return [term]
  return classes.map((number) => {
    const places = term.places.filter((_, index) => term.placeClasses[index] === number)
    return {
      ...term,
      name: termName(term.types, number + 1),
      places,
      placeClasses: places.map(() => 0),
      placeKey: placeKey(places[0]),
    }
  })
}
