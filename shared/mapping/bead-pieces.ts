import { atomLinks, type RepeatUnit } from '../chemistry'
import type { Bead, BeadAtom } from './mapping-document'

/**
 * The parts of a bead that hang together by bonds inside it, across the border to the neighbouring units as well.
 *
 * @param bead all of its atoms exist in the unit
 * @returns one list per piece, in the order of the bead's atoms; empty for an empty bead
 */
export function beadPieces(unit: RepeatUnit, bead: Bead): BeadAtom[][] {
  const links = atomLinks(unit)
  const bonded = (a: BeadAtom, b: BeadAtom): boolean =>
    links.some(
      ({ from, to, shift }) =>
        (a.atom === from && b.atom === to && b.unit - a.unit === shift) ||
        (b.atom === from && a.atom === to && a.unit - b.unit === shift),
    )
  const left = new Set(bead.atoms)
  const found: BeadAtom[][] = []
  for (const start of bead.atoms) {
    if (!left.delete(start)) continue
    const piece = [start]
    for (const member of piece) {
      for (const other of left) {
        if (bonded(member, other) && left.delete(other)) piece.push(other)
      }
    }
    found.push(bead.atoms.filter((atom) => piece.includes(atom)))
  }
  return found
}
