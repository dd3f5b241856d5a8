import { moved, type Point, type RepeatUnit } from '../chemistry'
import type { MappingDocument } from '../mapping'
import { type BoardLayout, positionsIn } from './board-layout'
import { beadPath } from './halo-path'

interface Line {
  readonly from: Point
  readonly to: Point
}

/** A neighbouring unit as far as it is drawn. */
export interface NeighbourShape {
  readonly positions: readonly Point[]
  /** Its backbone, and what beads of the drawn unit hold of it. */
  readonly shown: ReadonlySet<number>
  readonly halos: readonly { readonly id: string; readonly colour: number; readonly path: string }[]
  /** Bonds to side groups that are left out, and to the units on both sides. */
  readonly stubs: readonly Line[]
  readonly links: readonly Line[]
}

/** The unit before and the next one, with what their beads hold of the backbones and of the drawn unit. */
export function neighbourShapes(
  unit: RepeatUnit,
  board: BoardLayout,
  { beads }: MappingDocument,
): NeighbourShape[] {
  return ([-1, 1] as const).map((shift) => {
    const { backbone, ends } = board
    const reached = beads.flatMap(({ atoms }) =>
      atoms.filter((held) => held.unit === shift).map(({ atom }) => atom),
    )
    const shown = new Set([...backbone, ...reached])
    const positions = positionsIn(board, shift)
    const halos = beads.flatMap(({ id, colour, atoms }) => {
      // In the drawn unit all atoms are there to be seen, beyond the neighbour none.
      const held = atoms.filter(
        (each) => each.unit + shift === 0 || (each.unit === 0 && backbone.has(each.atom)),
      )
      return held.length === 0 ? [] : [{ id, colour, path: beadPath(unit, board, held, shift) }]
    })
    const stubs = unit.bonds.flatMap(({ from, to }) => {
      const [inside, outside] = shown.has(from) ? [from, to] : [to, from]
      if (!shown.has(inside) || shown.has(outside)) return []
      return [{ from: positions[inside], to: positions[outside] }]
    })
    const [before, after] = ends.map((end) => moved(board.neighbours[shift < 0 ? 0 : 1], end))
    const [head, tail] = unit.attachments
    const links = [
      { from: positions[head], to: before },
      { from: positions[tail], to: after },
    ]
    return { positions, shown, halos, stubs, links }
  })
}
