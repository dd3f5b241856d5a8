import type { CoordinateKind } from '../histogram/histogram'

/** A bead on the chain: which bead of the mapping, in which unit. */
export interface BeadPlace {
  readonly bead: string
  readonly unit: number
}

/** Where a term stands on the chain: two to four beads in a row; the smallest unit among them is 0. */
export type Place = BeadPlace[]

/** A bond, angle or dihedral kind of a mapping: one type sequence, at one or several places. */
export interface DerivedTerm {
  readonly kind: CoordinateKind
  /** Bead types in the canonical direction: of the two, the one that comes first in natural order. */
  readonly types: string[]
  /** Types joined by en dashes, such as B–E–H; with a number where the sequence was split, as in B–B–E (2). */
  readonly name: string
  /** Every place that carries this sequence, up to a shift along the chain; each read in the direction of `types`. */
  readonly places: Place[]
  /**
   * One number per place, from 0: places of one class have the same surroundings, those of different classes do not. More
   * than one class means that pooling the places mixes distributions that may differ.
   */
  readonly placeClasses: number[]
  /**
   * Which of several terms this is where the sequence was split by its places: the key of the first place, which stays while
   * the beads stay. Empty where all places of the sequence are pooled.
   */
  readonly placeKey: string
}

/**
 * The name of a term: its types joined by en dashes, and its number where the sequence is split into several terms.
 *
 * @param types two to four bead types
 * @param number from 1; left out where all places of the sequence are pooled
 * @example termName(['B', 'E', 'H']) // 'B–E–H'
 */
export function termName(types: readonly string[], number?: number): string {
  return types.join('–') + (number === undefined ? '' : ` (${number})`)
}

/**
 * How often a term stands in each repeat unit of the chain.
 *
 * @example multiplicity(deriveTerms(unit, threeToOne)[0]) // 1
 */
export function multiplicity(term: Pick<DerivedTerm, 'places'>): number {
  return term.places.length
}

/**
 * A place as text: bead ids with their units. A place read from its other end has another key.
 *
 * @example placeKey([{ bead: 'b', unit: 0 }, { bead: 'e', unit: 0 }]) // 'b@0 e@0'
 */
export function placeKey(place: readonly BeadPlace[]): string {
  return place.map(({ bead, unit }) => `${bead}@${unit}`).join(' ')
}
