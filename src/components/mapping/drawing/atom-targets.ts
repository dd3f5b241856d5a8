import type { Point } from '@shared/chemistry'
import type { AtomPlace, MappingDocument } from '@shared/mapping'
import { atomPoint, type BoardLayout } from '@shared/mapping-drawing'

/** An atom on the drawing that can be painted: of the unit, or of a neighbour as far as it is drawn. */
export interface AtomTarget extends AtomPlace {
  readonly point: Point
}

/** The atoms of the unit by index, then those of the unit before and the next one. */
export function atomTargets(board: BoardLayout, { beads }: MappingDocument): AtomTarget[] {
  const own = board.positions.map((point, atom) => ({ atom, unit: 0, point }))
  const across = [-1, 1].flatMap((unit) => {
    const reached = beads.flatMap(({ atoms }) =>
      atoms.filter((held) => held.unit === unit).map(({ atom }) => atom),
    )
    return [...new Set([...board.backbone, ...reached])].map((atom) => ({
      atom,
      unit,
      point: atomPoint(board, atom, unit),
    }))
  })
  return [...own, ...across]
}
