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
    connected(terms.filter((term) => term.kind === kind)).flatMap(({ members, centres }): TermGroup[] => {
      const found = [...centres].sort().map((key): TermCentre => {
        const counts = members.map((term) => centreKeys(term).filter((each) => each === key).length)
        const place = placeOf(key)
        const around = neighbours.get(place[0].bead) as number
        const degrees = kind === 'dihedral' || around === 2 ? 1 : 2 * around - 3
        return { place, places: sum(counts), degrees }
      })
      const keys = found.map(({ place }) => placeKey(place))
      const places = sum(found.map((centre) => centre.places))
      if (members.length === 1 && found.every((centre) => centre.places === 1)) return []
      const degrees = sum(found.map((centre) => centre.degrees))
      const grouped = members.map((term) => ({
        term,
        copies: keys.map((key) => centreKeys(term).filter((each) => each === key).length),
      }))
      const centre = termName(found[0].place.map(({ bead }) => typeOf.get(bead) as string))
      const surplus = sum(found.map((each) => Math.max(0, each.places - each.degrees)))
      return [{ kind, centre, centres: found, terms: grouped, places, degrees, surplus }]
    }),
  )
}

/** The centre of each place of an angle or dihedral, as text; a bond reads the same from both ends. */
function centreKeys({ places }: DerivedTerm): string[] {
  return places.map((place) => {
    const middle = place.slice(1, -1)
    const least = Math.min(...middle.map(({ unit }) => unit))
    const shifted = middle.map(({ bead, unit }) => ({ bead, unit: unit - least }))
    const [forth, back] = [placeKey(shifted), placeKey(shifted.toReversed())]
    return forth <= back ? forth : back
  })
}

function placeOf(key: string): Place {
  return key.split(' ').map((word) => {
    const [bead, unit] = word.split('@')
    return { bead, unit: Number(unit) }
  })
}

/** Terms joined by common centres, in the order of their first members. */
function connected(terms: readonly DerivedTerm[]): { members: DerivedTerm[]; centres: Set<string> }[] {
  let sets: { members: DerivedTerm[]; centres: Set<string> }[] = []
  for (const term of terms) {
    const keys = centreKeys(term)
    const joined = sets.filter(({ centres }) => keys.some((key) => centres.has(key)))
    const members = [...joined.flatMap((set) => set.members), term]
    const centres = new Set([...joined.flatMap((set) => [...set.centres]), ...keys])
    sets = [...sets.filter((set) => !joined.includes(set)), { members, centres }]
  }
  const place = (term: DerivedTerm): number => terms.indexOf(term)
  for (const { members } of sets) members.sort((a, b) => place(a) - place(b))
  return sets.sort((a, b) => place(a.members[0]) - place(b.members[0]))
}

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0)
}
