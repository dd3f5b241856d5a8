import type { RepeatUnit } from '../chemistry'
import type { CoordinateKind } from '../histogram/histogram'
import { derivePooledTerms } from './derive-terms'
import { listWords } from './list-words'
import type { MappingDocument } from './mapping-document'
import { partsOf, poolingOf } from './split-terms'
import type { DerivedTerm } from './term'

/** A type sequence at places that no symmetry of the chain exchanges: pooling them mixes distributions that may differ. */
export interface PlaceFlag {
  readonly kind: CoordinateKind
  readonly types: readonly string[]
  /** Name of the sequence, without a number. */
  readonly name: string
  /** The terms it falls into when split, one for each class of places. */
  readonly parts: readonly DerivedTerm[]
  /** What the user decided; null while nobody did, and the places are pooled until then. */
  readonly choice: 'split' | 'pooled' | null
  readonly reason: string
  readonly title: string
  readonly detail: string
}

/**
 * The sequences of a mapping whose places differ in their surroundings, with what was decided about each.
 *
 * @returns in the order of the terms; empty where every sequence stands at equivalent places only
 * @throws {InvalidInputError} as `deriveTerms`
 */
export function placeFlags(unit: RepeatUnit, document: MappingDocument): PlaceFlag[] {
  return derivePooledTerms(unit, document).flatMap((term): PlaceFlag[] => {
    const parts = partsOf(term)
    if (parts.length < 2) return []
    const { kind, types, name } = term
    const { choice = null, reason = '' } = poolingOf(document, types) ?? {}
    return [
      {
        kind,
        types,
        name,
        parts,
        choice,
        reason,
        title: `${name} stands at ${parts.length} places that differ`,
        detail: detail(document, name, parts, choice, reason),
      },
    ]
  })
}

function detail(
  document: MappingDocument,
  name: string,
  parts: readonly DerivedTerm[],
  choice: PlaceFlag['choice'],
  reason: string,
): string {
  const names = new Map(document.beads.map((bead) => [bead.id, bead.name]))
  const rows = parts.map(({ places: [place] }) =>
    place.map(({ bead, unit }) => `${names.get(bead)}${unit === 0 ? '' : `(+${unit})`}`).join('–'),
  )
  const where = `${listWords(rows)} have different surroundings, (+1) being the next unit.`
  if (choice === 'split')
    return `${where} Each is a term of its own: ${listWords(parts.map((part) => part.name))}.`
  if (choice === 'pooled') return `${where} They are pooled: ${reason}`
  return `${where} One table for ${name} mixes their distributions: split them, or pool them and say why.`
}
