import type { RepeatUnit } from '../chemistry'
import { beadLinks } from './bead-links'
import type { MappingDocument } from './mapping-document'
import { placeKey, termName, type DerivedTerm, type Place } from './term'

/** A bond that dihedrals turn about, or a bead that angles meet at; where it stands, up to a shift along the chain. */
export interface TermCentre {
  readonly place: Place
  /** Places of terms that have this centre. */
  readonly places: number
  /** How many of them are independent: 1 about a bond, 2d − 3 at a bead with d neighbours. */
  readonly degrees: number
}

/** A term of a group. */
export interface GroupedTerm {
  readonly term: DerivedTerm
  /** How often it stands at each centre, in the order of the group's centres; 0 where it does not. */
  readonly copies: readonly number[]
}

/** Angles that share a central bead, or dihedrals that share a central bond. */
export interface TermGroup {
  readonly kind: 'angle' | 'dihedral'
  /** What they share, by bead types: one for angles, two for dihedrals; as in B–B. */
  readonly centre: string
  readonly centres: readonly TermCentre[]
  readonly terms: readonly GroupedTerm[]
  readonly places: number
  readonly degrees: number
  /** Places beyond the independent ones: terms that describe a motion others describe already. */
  readonly surplus: number
}

/**
 * Groups of terms that share a centre, where several terms do or one stands there several times. Terms that are pooled over
 * several centres join them into one group. A chain without branches has no groups.
 *
 * Degrees of freedom: with bonds of fixed length the d neighbours of a bead have 2d directions less the 3 rotations of the
 * whole; with all angles fixed one dihedral turns what hangs on one end of a bond against the other (analytic).
 *
 * @param terms derived from the same unit and document
 * @returns angles, then dihedrals, in the order of their first term
 */
export function termGroups(
  unit: RepeatUnit,
  document: MappingDocument,
  terms: readonly DerivedTerm[],
): TermGroup[] {
  const neighbours = new Map(document.beads.map(({ id }) => [id, 0]))
  for (const { from } of beadLinks(unit, document)) {
    const { id } = document.beads[from]
    neighbours.set(id, (neighbours.get(id) as number) + 1)
  }
  const typeOf = new Map(document.beads.map(({ id, type }) => [id, type]))
  return (['angle', 'dihedral'] as const).flatMap((kind) =>
    connected(terms.filter((term) => term.kind === kind)).flatMap((members): TermGroup[] => {
      const keys = [...new Set(members.flatMap(({ counts }) => [...counts.keys()]))].sort()
      const centres = keys.map((key): TermCentre => {
        const place = placeOf(key)
        const around = neighbours.get(place[0].bead) as number
        const degrees = kind === 'dihedral' || around === 2 ? 1 : 2 * around - 3
        return { place, places: sum(members.map(({ counts }) => counts.get(key) ?? 0)), degrees }
      })
      if (members.length === 1 && centres.every(({ places }) => places === 1)) return []
      const grouped = members.map(({ term, counts }) => ({
        term,
        copies: keys.map((key) => counts.get(key) ?? 0),
      }))
      const centre = termName(centres[0].place.map(({ bead }) => typeOf.get(bead) as string))
      const places = sum(centres.map((each) => each.places))
      const degrees = sum(centres.map((each) => each.degrees))
      const surplus = sum(centres.map((each) => Math.max(0, each.places - each.degrees)))
      return [{ kind, centre, centres, terms: grouped, places, degrees, surplus }]
    }),
  )
}

/** A term with how often it stands at each of its centres. */
interface CentredTerm {
  readonly term: DerivedTerm
  readonly counts: ReadonlyMap<string, number>
}

/** The centre of each place of an angle or dihedral as text, counted; a bond reads the same from both ends. */
function centreCounts({ places }: DerivedTerm): Map<string, number> {
  const counts = new Map<string, number>()
  for (const place of places) {
    const middle = place.slice(1, -1)
    const least = Math.min(...middle.map(({ unit }) => unit))
    const shifted = middle.map(({ bead, unit }) => ({ bead, unit: unit - least }))
    const key = [placeKey(shifted), placeKey(shifted.toReversed())].sort()[0]
    counts.set(key, (counts.get(key) ?? 0) + 1)
  }
  return counts
}

function placeOf(key: string): Place {
  return key.split(' ').map((word) => {
    const [bead, unit] = word.split('@')
    return { bead, unit: Number(unit) }
  })
}

/** Terms joined by common centres; sets and their terms in the order of the terms. */
function connected(terms: readonly DerivedTerm[]): CentredTerm[][] {
  let sets: { members: CentredTerm[]; centres: Set<string> }[] = []
  for (const term of terms) {
    const counts = centreCounts(term)
    const joined = sets.filter(({ centres }) => [...counts.keys()].some((key) => centres.has(key)))
    const members = [...joined.flatMap((set) => set.members), { term, counts }]
    const centres = new Set([...joined.flatMap((set) => [...set.centres]), ...counts.keys()])
    sets = [...sets.filter((set) => !joined.includes(set)), { members, centres }]
  }
  const rank = ({ term }: CentredTerm): number => terms.indexOf(term)
  return sets
    .map(({ members }) => members.sort((a, b) => rank(a) - rank(b)))
    .sort((a, b) => rank(a[0]) - rank(b[0]))
}

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0)
}
