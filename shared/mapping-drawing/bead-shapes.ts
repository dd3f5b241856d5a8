import type { Point, RepeatUnit } from '../chemistry'
import type { Bead, MappingDocument } from '../mapping'
import { atomPoint, type BoardLayout } from './board-layout'
import { letterPlace } from './free-places'
import { beadPath, sitePoint } from './halo-path'

/** What of a bead is drawn. */
export interface BeadShape extends Pick<Bead, 'id' | 'name' | 'colour'> {
  /** The way of its halo. */
  readonly path: string
  /** Where its letter and its site stand; null for a bead without atoms. */
  readonly letter: Point | null
  readonly site: Point | null
}

/** The beads of a mapping as they are drawn, letters off everything else as far as there is room. */
export function beadShapes(unit: RepeatUnit, board: BoardLayout, { beads }: MappingDocument): BeadShape[] {
  const letters: Point[] = [...board.ends]
  // Atoms across the border stand behind those of the unit, so that one list of positions holds them all.
  const across = beads.flatMap(({ atoms }) => atoms.filter((held) => held.unit !== 0))
  const positions = [...board.positions, ...across.map((held) => atomPoint(board, held.atom, held.unit))]
  return beads.map((bead) => {
    const held = bead.atoms.map((each) =>
      each.unit === 0 ? each.atom : board.positions.length + across.indexOf(each),
    )
    const letter = held.length === 0 ? null : letterPlace(held, positions, unit.bonds, letters)
    if (letter) letters.push(letter)
    const { id, name, colour } = bead
    return {
      id,
      name,
      colour,
      letter,
      path: beadPath(unit, board, bead.atoms),
      site: sitePoint(unit, board, bead),
    }
  })
}
