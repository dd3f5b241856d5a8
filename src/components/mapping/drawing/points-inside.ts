import type { Point } from '@shared/chemistry'

/**
 * Which points lie inside a closed loop, by the even–odd rule: a ray to the right crosses the loop an odd number of times.
 *
 * @param loop corners in order; fewer than three hold nothing
 * @returns indices of points
 */
export function pointsInside(points: readonly Point[], loop: readonly Point[]): number[] {
  return points.flatMap((point, index) => (isInside(point, loop) ? [index] : []))
}

function isInside({ x, y }: Point, loop: readonly Point[]): boolean {
  let inside = false
  loop.forEach((from, index) => {
    const to = loop[(index + 1) % loop.length]
    // Half-open in y, so that a corner on the ray counts once.
    if (from.y > y === to.y > y) return
    if (x < from.x + ((y - from.y) / (to.y - from.y)) * (to.x - from.x)) inside = !inside
  })
  return inside
}
