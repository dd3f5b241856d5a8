import { compareTypeSequences } from './compare-types'
import type { MappingDocument, TermChoice, TermPooling } from './mapping-document'
import type { DerivedTerm } from './term'

/** What names a term in the document: its sequence, and which of its places where it was split. */
export type TermReference = Pick<DerivedTerm, 'types' | 'placeKey'>

/**
 * Splits a type sequence by its places, or pools them with a reason.
 *
 * @param types in either direction
 * @param choice null takes the decision back
 * @param reason why; a pooled sequence needs one
 * @example setPooling(document, ['B', 'B', 'E'], 'split')
 */
export function setPooling(
  document: MappingDocument,
  types: readonly string[],
  choice: TermPooling['choice'] | null,
  reason = '',
): MappingDocument {
  const own = canonicalTypes(types)
  const others = (document.poolings ?? []).filter((pooling) => !sameTypes(pooling.types, own))
  const poolings = choice === null ? others : [...others, { types: own, choice, reason }]
  return { ...document, poolings }
}

/**
 * Uses a term or leaves it out of the set.
 *
 * @param use null takes the choice back: the term is used
 */
export function setTermUse(
  document: MappingDocument,
  term: TermReference,
  use: TermChoice['use'] | null,
  reason = '',
): MappingDocument {
  const others = (document.termChoices ?? []).filter((choice) => !isChoiceOf(choice, term))
  const { types, placeKey } = term
  const termChoices = use === null ? others : [...others, { types: [...types], placeKey, use, reason }]
  return { ...document, termChoices }
}

/** Whether a stored choice is about this term. */
export function isChoiceOf(
  choice: TermChoice,
  { types, placeKey = '' }: { readonly types: readonly string[]; readonly placeKey?: string },
): boolean {
  return choice.placeKey === placeKey && sameTypes(choice.types, types)
}

/** The same decisions after a bead type got another name. */
export function renameInDecisions(document: MappingDocument, before: string, after: string): MappingDocument {
  const renamed = (types: readonly string[]): string[] =>
    canonicalTypes(types.map((type) => (type === before ? after : type)))
  const { poolings, termChoices } = document
  return {
    ...document,
    ...(poolings && { poolings: poolings.map((one) => ({ ...one, types: renamed(one.types) })) }),
    ...(termChoices && { termChoices: termChoices.map((one) => ({ ...one, types: renamed(one.types) })) }),
  }
}

function canonicalTypes(types: readonly string[]): string[] {
  const back = types.toReversed()
  return compareTypeSequences(types, back) <= 0 ? [...types] : back
}

function sameTypes(one: readonly string[], other: readonly string[]): boolean {
  return one.join('\n') === other.join('\n')
}
