import type { CoordinateKind } from '../histogram/histogram'
import type { Place } from './term'

/** A term, as far as this looks at it. */
interface PlacedTerm {
  readonly kind: CoordinateKind
  readonly places: readonly Place[]
}

/**
 * The angle terms a dihedral is made of: those that stand on its first or its last three beads somewhere along the chain, in
 * either direction; each once. Other kinds have none.
 */
export function anglesOf<Term extends PlacedTerm>(dihedral: PlacedTerm, terms: readonly Term[]): Term[] {
  if (dihedral.kind !== 'dihedral') return []
  const wanted = new Set(
    dihedral.places.flatMap((place) => [placeKey(place.slice(0, 3)), placeKey(place.slice(1))]),
  )
  return terms.filter(
    ({ kind, places }) => kind === 'angle' && places.some((place) => wanted.has(placeKey(place))),
  )
}

/** A row of beads wherever it starts along the chain and from whichever end it is read. */
function placeKey(place: Place): string {
  const from = (beads: Place): string => {
    const least = Math.min(...beads.map(({ unit }) => unit))
    return beads.map(({ bead, unit }) => `${bead} ${unit - least}`).join(', ')
  }
  return [from(place), from([...place].reverse())].sort()[0]
}
