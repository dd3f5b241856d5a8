import type { Point } from '@shared/chemistry'
import { HALO_RADIUS } from '@shared/mapping-drawing'

/** The atom whose disc a point is in, the nearest one where discs meet; null off all of them. */
export function atomAt(positions: readonly Point[], { x, y }: Point): number | null {
  let [chosen, least]: [number | null, number] = [null, HALO_RADIUS]
  positions.forEach((position, atom) => {
    const distance = Math.hypot(position.x - x, position.y - y)
    if (distance <= least) [chosen, least] = [atom, distance]
  })
  return chosen
}
