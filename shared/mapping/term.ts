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
  /** Types joined by en dashes, such as B–E–H. */
  readonly name: string
  /** Every place that carries this sequence, up to a shift along the chain; each read in the direction of `types`. */
  readonly places: Place[]
  /**
   * One number per place, from 0: places of one class have the same surroundings, those of different classes do not. More
   * than one class means that pooling the places mixes distributions that may differ.
   */
  readonly placeClasses: number[]
}

/**
 * The name of a term: its types joined by en dashes.
 *
 * @param types two to four bead types
 * @example termName(['B', 'E', 'H']) // 'B–E–H'
 */
export function termName(types: readonly string[]): string {
  return types.join('–')
}
