import type { RepeatUnit } from '../chemistry'
import type { CoordinateKind } from '../histogram/histogram'
import { beadLinks, checkAtoms, type BeadLink } from './bead-links'
import { compareTypes, compareTypeSequences } from './compare-types'
import type { MappingDocument } from './mapping-document'
import { chainClasses, placeSignature } from './place-signature'
import { splitTerms } from './split-terms'
import { placeKey, termName, type DerivedTerm, type Place } from './term'
import { checkTermPlaces } from './term-limit'

const KINDS: readonly CoordinateKind[] = ['bond', 'angle', 'dihedral']

/** A row of bonded beads of the endless chain, in one direction. */
interface Row {
  readonly types: string[]
  readonly place: Place
  readonly signature: string
}

/**
 * The terms of a mapping: every bond, angle and dihedral of an endless chain of repeat units, across their borders. Rows of
 * beads that carry the same type sequence, or its reverse, are one term, unless the document splits it by its places; where
 * they stand is listed up to a shift along the chain. The beads of a row are all different, so a dihedral is a path of four. The result does not depend on the order of beads
 * or atoms in the document.
 *
 * @param unit the repeat unit
 * @param document the mapping; atoms may still be in no bead
 * @returns bonds, angles, dihedrals, in each by the types they hold in natural order
 * @throws {InvalidInputError} MAPPING_INVALID when a bead names an atom that the unit does not have, or when the terms stand
 *   at more than `MAX_TERM_PLACES` places
 * @example deriveTerms(unit, oneBead).map((term) => term.name) // ['A–A', 'A–A–A', 'A–A–A–A']
 */
export function deriveTerms(unit: RepeatUnit, document: MappingDocument): DerivedTerm[] {
  return splitTerms(derivePooledTerms(unit, document), document)
}

/**
 * The terms with all places of a sequence pooled, whatever the document says about splitting.
 *
 * @throws {InvalidInputError} as `deriveTerms`
 */
export function derivePooledTerms(unit: RepeatUnit, document: MappingDocument): DerivedTerm[] {
  checkAtoms(unit, document)
  checkTermPlaces(unit, document)
  const links = beadLinks(unit, document)
  const classes = chainClasses(unit, document)
  const linksFrom: BeadLink[][] = document.beads.map(() => [])
  for (const link of links) linksFrom[link.from].push(link)

  const terms = KINDS.map(
    () => new Map<string, { types: string[]; rows: Map<string, string>; places: Map<string, Place> }>(),
  )
  const walk = (row: BeadLink[], visited: { bead: number; unit: number }[]): void => {
    if (row.length > 0) {
      const { types, place, signature } = canonicalRow(document, row, visited, (way) =>
        placeSignature(classes, way),
      )
      const ofKind = terms[row.length - 1]
      const name = termName(types)
      const term = ofKind.get(name) ?? {
        types,
        rows: new Map<string, string>(),
        places: new Map<string, Place>(),
      }
      const key = placeKey(place)
      term.rows.set(key, signature)
      term.places.set(key, place)
      ofKind.set(name, term)
    }
    if (row.length === KINDS.length) return
    const last = visited[visited.length - 1]
    for (const link of linksFrom[last.bead]) {
      const next = { bead: link.to, unit: last.unit + link.shift }
      if (visited.some(({ bead, unit: at }) => bead === next.bead && at === next.unit)) continue
      walk([...row, link], [...visited, next])
    }
  }
  document.beads.forEach((_, bead) => walk([], [{ bead, unit: 0 }]))

  return KINDS.flatMap((kind, index) =>
    [...terms[index].values()]
      .map(({ types, rows, places }) => ({
        kind,
        types,
        name: termName(types),
        placeKey: '',
        ...ordered(rows, places),
      }))
      .sort((a, b) => compareTerms(a.types, b.types)),
  )
}

/** The direction whose types come first; for a palindrome the one whose place comes first. */
function canonicalRow(
  document: MappingDocument,
  row: readonly BeadLink[],
  visited: readonly { bead: number; unit: number }[],
  sign: (row: readonly BeadLink[]) => string,
): Row {
  const least = Math.min(...visited.map(({ unit }) => unit))
  const place = visited.map(({ bead, unit }) => ({ bead: document.beads[bead].id, unit: unit - least }))
  const types = visited.map(({ bead }) => document.beads[bead].type)
  const back: Row = { types: types.toReversed(), place: place.toReversed(), signature: sign(reversed(row)) }
  const forth: Row = { types, place, signature: sign(row) }
  const order = compareTypeSequences(forth.types, back.types)
  if (order !== 0) return order < 0 ? forth : back
  const first = placeKey(forth.place) <= placeKey(back.place) ? forth : back
  const signature = forth.signature <= back.signature ? forth.signature : back.signature
  return { ...first, signature }
}

function reversed(row: readonly BeadLink[]): BeadLink[] {
  return row.toReversed().map(({ from, to, shift, atomBonds }) => ({
    from: to,
    to: from,
    shift: -shift,
    atomBonds: atomBonds.map((bond) => ({ from: bond.to, to: bond.from, label: bond.label })),
  }))
}

/** Places in the order of their keys; classes numbered by what surrounds them, the same whichever way the unit is written. */
function ordered(
  signatures: ReadonlyMap<string, string>,
  places: ReadonlyMap<string, Place>,
): Pick<DerivedTerm, 'places' | 'placeClasses'> {
  const keys = [...places.keys()].sort()
  const numbers = new Map([...new Set(signatures.values())].sort().map((text, number) => [text, number]))
  const placeClasses = keys.map((key) => numbers.get(signatures.get(key) as string) as number)
  return { places: keys.map((key) => places.get(key) as Place), placeClasses }
}

/** By what a term is made of first, so that B–B–E and E–B–E stand together, then by the sequence. */
function compareTerms(a: readonly string[], b: readonly string[]): number {
  return (
    compareTypeSequences(a.toSorted(compareTypes), b.toSorted(compareTypes)) || compareTypeSequences(a, b)
  )
}
