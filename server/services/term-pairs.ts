import type { Place } from '../../shared/contracts/mapping'
import type { CoordinateKind } from '../../shared/histogram/histogram'

/** A term, as far as pairing looks at it. */
export interface PlacedTerm {
  readonly kind: CoordinateKind
  readonly places: readonly Place[]
}

/** Two terms that meet somewhere on the chain; the one with fewer beads first, else in the order of the terms. */
export interface TermPair<T> {
  readonly first: T
  readonly second: T
  /** Most beads that both have in common where they meet, at least 1. */
  readonly sharedBeads: number
}

/** Kinds in the order people ask about them; what is coupled most often first. */
const ORDER = [
  'bond angle',
  'bond bond',
  'angle angle',
  'angle dihedral',
  'dihedral dihedral',
  'bond dihedral',
]
const KINDS: readonly CoordinateKind[] = ['bond', 'angle', 'dihedral']

/**
 * Every pair of terms that shares a bead: bonds with angles first, then by kinds; within the same kinds those first that have
 * most beads in common, such as a bond that is a side of the angle, else in the order of the terms. Places are taken up to a
 * shift along the chain.
 */
export function termPairs<T extends PlacedTerm>(terms: readonly T[]): TermPair<T>[] {
  const beads = terms.map(({ places }) => new Set(places.flat().map(({ bead }) => bead)))
  const pairs: { readonly pair: TermPair<T>; readonly rank: number }[] = []
  terms.forEach((one, index) => {
    for (let other = index + 1; other < terms.length; other++) {
      if (![...beads[index]].some((bead) => beads[other].has(bead))) continue
      const swapped = KINDS.indexOf(terms[other].kind) < KINDS.indexOf(one.kind)
      const [first, second] = swapped ? [terms[other], one] : [one, terms[other]]
      const sharedBeads = mostShared(first.places, second.places)
      pairs.push({
        pair: { first, second, sharedBeads },
        rank: ORDER.indexOf(`${first.kind} ${second.kind}`),
      })
    }
  })
  // A sort keeps what is equal in the order of the terms.
  return pairs
    .sort((a, b) => a.rank - b.rank || b.pair.sharedBeads - a.pair.sharedBeads)
    .map(({ pair }) => pair)
}

/** Where one bead is the same, the chain can be shifted so that both terms stand on it at once. */
function mostShared(first: readonly Place[], second: readonly Place[]): number {
  let most = 0
  for (const place of first) {
    for (const other of second) {
      for (const shift of shiftsBetween(place, other)) {
        const shared = place.filter(({ bead, unit }) =>
          other.some((each) => each.bead === bead && each.unit + shift === unit),
        )
        most = Math.max(most, shared.length)
      }
    }
  }
  return most
}

function shiftsBetween(place: Place, other: Place): Set<number> {
  return new Set(
    place.flatMap(({ bead, unit }) =>
      other.filter((each) => each.bead === bead).map((each) => unit - each.unit),
    ),
  )
}
