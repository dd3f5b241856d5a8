import type { CoordinateKind } from '../../shared/histogram/histogram'
import type { DerivedTerm, MappingDocument } from '../../shared/mapping'

/** A stored term, as far as matching looks at it. */
export interface StoredTerm {
  readonly id: string
  readonly kind: CoordinateKind
  readonly types: readonly string[]
  /** As `DerivedTerm.placeKey`. */
  readonly placeKey: string
  readonly current: boolean
}

/** What a save of the mapping does to the stored terms. */
export interface TermChanges {
  /** Stored terms that stay, or come back, with what is now derived for them. */
  readonly kept: readonly { readonly id: string; readonly term: DerivedTerm }[]
  readonly added: readonly DerivedTerm[]
  /** Ids of stored terms that the mapping no longer has. */
  readonly vanished: readonly string[]
}

/**
 * Which stored term each derived term is. A term is its kind and type sequence, and
 * its place where the sequence is split. A bead type that was renamed throughout —
 * told by the ids of the beads that carry it — takes its terms along; types that swapped their names count as renamed.
 * Terms that had vanished come back under the names they left with.
 *
 * @param before the document the stored terms were derived from
 * @param after the document the derived terms follow from
 */
export function matchTerms(
  stored: readonly StoredTerm[],
  derived: readonly DerivedTerm[],
  before: MappingDocument,
  after: MappingDocument,
): TermChanges {
  const renamed = renamedTypes(before, after)
  const newNames = new Set(renamed.values())
  // How well a stored term stands for its sequence: a vanished one least; then one whose beads went while others took over
  // the name of their type; best one whose beads are still there.
  const claim = ({ current, types }: StoredTerm): number => {
    if (!current) return 0
    return types.some((type) => newNames.has(type) && !renamed.has(type)) ? 1 : 2
  }
  const byKey = new Map<string, StoredTerm>()
  for (const term of [...stored].sort((a, b) => claim(a) - claim(b))) {
    const types = term.current ? term.types.map((type) => renamed.get(type) ?? type) : term.types
    byKey.set(termKey(term.kind, types, term.placeKey), term)
  }
  const kept: { id: string; term: DerivedTerm }[] = []
  const added: DerivedTerm[] = []
  for (const term of derived) {
    const match = byKey.get(termKey(term.kind, term.types, term.placeKey))
    if (match) kept.push({ id: match.id, term })
    else added.push(term)
  }
  const keptIds = new Set(kept.map(({ id }) => id))
  return { kept, added, vanished: stored.filter(({ id }) => !keptIds.has(id)).map(({ id }) => id) }
}

/** The same for a sequence and its reverse, with their place read the same way. */
function termKey(kind: CoordinateKind, types: readonly string[], placeKey: string): string {
  const either = (words: readonly string[]): string => {
    const [forward, backward] = [words.join('\n'), words.toReversed().join('\n')]
    return forward < backward ? forward : backward
  }
  return [kind, either(types), either(placeKey.split(' '))].join('\n\n')
}

/**
 * Types whose beads, as far as they are still there, all carry one new type that no other bead carried before: old name →
 * new name. A type that split up or was merged into another is not renamed.
 */
function renamedTypes(before: MappingDocument, after: MappingDocument): Map<string, string> {
  const typeAfter = new Map(after.beads.map(({ id, type }) => [id, type]))
  const targets = new Map<string, Set<string>>()
  const sources = new Map<string, Set<string>>()
  const add = (map: Map<string, Set<string>>, key: string, value: string): void => {
    map.set(key, (map.get(key) ?? new Set()).add(value))
  }
  for (const { id, type } of before.beads) {
    const now = typeAfter.get(id)
    if (now === undefined) continue
    add(targets, type, now)
    add(sources, now, type)
  }
  const renamed = new Map<string, string>()
  for (const [type, names] of targets) {
    const [name] = names
    if (names.size === 1 && name !== type && sources.get(name)?.size === 1) renamed.set(type, name)
  }
  return renamed
}
