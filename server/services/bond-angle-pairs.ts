import type { CoordinateKind } from '../../shared/histogram/histogram'
import type { Place } from '../../shared/contracts/mapping'

/** A term, as far as pairing looks at it. */
export interface PlacedTerm {
  readonly kind: CoordinateKind
  readonly places: readonly Place[]
}

/** A bond and an angle that meet somewhere on the chain. */
export interface BondAnglePair<T> {
  readonly bond: T
  readonly angle: T
  /** The bond is one of the two sides of the angle, at one place at least. */
  readonly side: boolean
}

/**
 * Every bond–angle pair that shares a bead, those first whose bond is a side of the angle; otherwise in the order of the terms.
 * Places are taken up to a shift along the chain.
 */
export function bondAnglePairs<T extends PlacedTerm>(terms: readonly T[]): BondAnglePair<T>[] {
  const bonds = terms.filter(({ kind }) => kind === 'bond')
  const angles = terms.filter(({ kind }) => kind === 'angle')
  const pairs = bonds.flatMap((bond) =>
    angles
      .filter((angle) => sharesBead(bond, angle))
      .map((angle) => ({ bond, angle, side: isSide(bond, angle) })),
  )
  return pairs.sort((a, b) => Number(b.side) - Number(a.side))
}

/** Where one bead is the same, the chain can be shifted so that both terms stand on it at once. */
function sharesBead(bond: PlacedTerm, angle: PlacedTerm): boolean {
  const beads = new Set(bond.places.flat().map(({ bead }) => bead))
  return angle.places.flat().some(({ bead }) => beads.has(bead))
}

function isSide(bond: PlacedTerm, angle: PlacedTerm): boolean {
  const bonds = new Set(bond.places.map(([a, b]) => step(a, b)))
  return angle.places.some(([a, b, c]) =>
    [step(a, b), step(b, a), step(b, c), step(c, b)].some((key) => bonds.has(key)),
  )
}

type BeadOnChain = Place[number]

/** Two beads in a row, the same wherever along the chain they stand. */
function step(from: BeadOnChain, to: BeadOnChain): string {
  return `${from.bead} ${to.bead} ${to.unit - from.unit}`
}
