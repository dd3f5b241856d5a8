import type { Point } from '@shared/chemistry'
import { type Box, HALO_RADIUS } from './board-layout'

const DIRECTIONS = 24
const LETTER_DISTANCE = HALO_RADIUS + 2

/**
 * Where the letter of a bead goes: on the rim of its halo, as far as possible from all other atoms and letters.
 *
 * @param held atoms of the bead
 * @param letters places of letters that are taken
 */
export function letterPlace(
  held: readonly number[],
  positions: readonly Point[],
  letters: readonly Point[],
): Point {
  const candidates = held.flatMap((atom) =>
    Array.from({ length: DIRECTIONS }, (_, step) => {
      const angle = (2 * Math.PI * step) / DIRECTIONS
      return {
        x: positions[atom].x + LETTER_DISTANCE * Math.cos(angle),
        y: positions[atom].y + LETTER_DISTANCE * Math.sin(angle),
      }
    }),
  )
  const room = (place: Point) => Math.min(nearest(place, positions), nearest(place, letters) - HALO_RADIUS)
  return best(candidates, room)
}

/**
 * Where a note of the given size goes: inside the frame, off all atoms if it can, near the atom it is about.
 *
 * @returns its upper left corner
 */
export function notePlace(
  about: Point,
  size: { readonly width: number; readonly height: number },
  frame: Box,
  positions: readonly Point[],
): Point {
  const step = 16
  const candidates: Point[] = []
  for (let x = frame.x; x <= frame.x + frame.width - size.width; x += step) {
    for (let y = frame.y; y <= frame.y + frame.height - size.height; y += step) candidates.push({ x, y })
  }
  const covered = (place: Point) =>
    positions.filter((atom) => distanceTo({ ...place, ...size }, atom) < HALO_RADIUS + 12).length
  const merit = (place: Point) => -1000 * covered(place) - distanceTo({ ...place, ...size }, about)
  return candidates.length === 0 ? { x: frame.x, y: frame.y } : best(candidates, merit)
}

function distanceTo({ x, y, width, height }: Box, point: Point): number {
  const dx = Math.max(x - point.x, 0, point.x - x - width)
  const dy = Math.max(y - point.y, 0, point.y - y - height)
  return Math.hypot(dx, dy)
}

function nearest(place: Point, points: readonly Point[]): number {
  return points.reduce(
    (least, point) => Math.min(least, Math.hypot(point.x - place.x, point.y - place.y)),
    Infinity,
  )
}

function best(candidates: readonly Point[], merit: (place: Point) => number): Point {
  const merits = candidates.map(merit)
  return candidates[merits.indexOf(Math.max(...merits))]
}
