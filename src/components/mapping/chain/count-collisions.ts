import type { Point } from '@shared/chemistry'

/** A drawing of beads and straight bonds; bonds by index of their beads. */
export interface BeadDrawing {
  readonly beads: readonly Point[]
  readonly bonds: readonly { readonly from: number; readonly to: number }[]
}

/** Beads nearer than this cannot be told apart, px between their centres. */
const BEAD_TO_BEAD = 23
/** A bond that passes a bead nearer than this seems to end in it, px from its centre. */
const BEAD_TO_BOND = 12.5

/** How many pairs of beads lie on one another, and how many bonds run through a bead that is not theirs. */
export function countCollisions({ beads, bonds }: BeadDrawing): number {
  let count = 0
  beads.forEach((bead, index) => {
    for (let other = 0; other < index; other++) {
      const [dx, dy] = [bead.x - beads[other].x, bead.y - beads[other].y]
      if (dx * dx + dy * dy < BEAD_TO_BEAD ** 2) count++
    }
    for (const { from, to } of bonds) {
      if (from === index || to === index) continue
      if (squaredDistance(bead, beads[from], beads[to]) < BEAD_TO_BOND ** 2) count++
    }
  })
  return count
}

/** From a point to the nearest point of a bond. */
function squaredDistance(point: Point, from: Point, to: Point): number {
  const [dx, dy] = [to.x - from.x, to.y - from.y]
  const square = dx * dx + dy * dy
  const share = square === 0 ? 0 : ((point.x - from.x) * dx + (point.y - from.y) * dy) / square
  const within = Math.min(1, Math.max(0, share))
  return (point.x - from.x - within * dx) ** 2 + (point.y - from.y - within * dy) ** 2
}
