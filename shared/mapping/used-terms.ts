import { isChoiceOf } from './edit-decisions'
import type { MappingDocument, TermChoice } from './mapping-document'

/**
 * The terms that the document does not leave out. Terms nobody chose about are used.
 *
 * @param terms derived ones, or stored ones with their `placeKey`
 */
export function usedTerms<Term extends { readonly types: readonly string[]; readonly placeKey?: string }>(
  document: MappingDocument,
  terms: readonly Term[],
): Term[] {
  return terms.filter((term) => choiceOf(document, term)?.use !== 'left out')
}

/** What the user decided about a term, if anything. */
export function choiceOf(
  document: MappingDocument,
  term: { readonly types: readonly string[]; readonly placeKey?: string },
): TermChoice | undefined {
  return document.termChoices?.find((choice) => isChoiceOf(choice, term))
}
