import type { Point } from '../chemistry'
import { type Box, HALO_RADIUS } from './board-layout'

const DIRECTIONS = 24
const LETTER_DISTANCE = HALO_RADIUS + 2

/** A bond is stood for by points this share of its length apart. */
const BOND_SHARES = [0.25, 0.5, 0.75]

/**
 * Where the letter of a bead goes: on the outer rim of its halo, as far as possible from everything else that is drawn.
 *
 * @param held atoms of the bead, at least one
 * @param letters places of letters that are taken
 */
export function letterPlace(
  held: readonly number[],
  positions: readonly Point[],
  bonds: readonly { readonly from: number; readonly to: number }[],
  letters: readonly Point[],
): Point {
  const inside = new Set(held)
  const pointsOf = (own: boolean) => [
    ...positions.filter((_, atom) => inside.has(atom) === own),
    ...bonds
      .filter(({ from, to }) => (inside.has(from) && inside.has(to)) === own)
      .flatMap(({ from, to }) => BOND_SHARES.map((share) => between(positions[from], positions[to], share))),
  ]
  const [own, others] = [pointsOf(true), [...pointsOf(false), ...letters]]
  const candidates = held.flatMap((atom) =>
    Array.from({ length: DIRECTIONS }, (_, step) => {
      const angle = (2 * Math.PI * step) / DIRECTIONS
      return {
        x: positions[atom].x + LETTER_DISTANCE * Math.cos(angle),
        y: positions[atom].y + LETTER_DISTANCE * Math.sin(angle),
      }
    }),
  )
  // A place nearer than the rim lies inside the halo: the last resort.
  const room = (place: Point) =>
    Math.min(nearest(place, others), 3 * HALO_RADIUS) -
    100 * Math.max(0, LETTER_DISTANCE - 1 - nearest(place, own))
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

function between(from: Point, to: Point, share: number): Point {
  return { x: from.x + share * (to.x - from.x), y: from.y + share * (to.y - from.y) }
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
