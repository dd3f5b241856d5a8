import type { Point } from '@shared/chemistry'

export type Direction = 'ArrowLeft' | 'ArrowRight' | 'ArrowUp' | 'ArrowDown'

const UNIT_VECTORS: Record<Direction, Point> = {
  ArrowLeft: { x: -1, y: 0 },
  ArrowRight: { x: 1, y: 0 },
  ArrowUp: { x: 0, y: -1 },
  ArrowDown: { x: 0, y: 1 },
}

/**
 * The nearest atom in a direction; the same atom when there is none. Being off to the side counts half as much again: enough to
 * stay on course, and too little to skip the next atom of a zigzag.
 */
export function atomTowards(positions: readonly Point[], from: number, direction: Direction): number {
  const { x: ux, y: uy } = UNIT_VECTORS[direction]
  let chosen = from
  let least = Infinity
  positions.forEach(({ x, y }, atom) => {
    const [dx, dy] = [x - positions[from].x, y - positions[from].y]
    const ahead = dx * ux + dy * uy
    if (ahead < 1) return
    const cost = ahead + 1.5 * Math.abs(dx * uy - dy * ux)
    if (cost < least) [least, chosen] = [cost, atom]
  })
  return chosen
}
