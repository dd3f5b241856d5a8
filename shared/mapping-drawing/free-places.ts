import type { Point } from '../chemistry'
import { type Box, HALO_RADIUS } from './board-layout'

const DIRECTIONS = 24
const LETTER_DISTANCE = HALO_RADIUS + 2

/** A bond is stood for by points this share of its length apart. */
const BOND_SHARES = [0.25, 0.5, 0.75]
/** Places for a note that are tried along each side of the window. */
const NOTE_STEPS = 36

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
  // As many places on a large drawing as on a small one.
  const [right, down] = [frame.width / NOTE_STEPS, frame.height / NOTE_STEPS]
  const candidates: Point[] = []
  for (let x = frame.x; x <= frame.x + frame.width - size.width; x += right) {
    for (let y = frame.y; y <= frame.y + frame.height - size.height; y += down) candidates.push({ x, y })
  }
  const covered = (place: Point) => {
    let count = 0
    for (const atom of positions) if (distanceTo(place, size, atom) < HALO_RADIUS + 12) count++
    return count
  }
  const merit = (place: Point) => -1000 * covered(place) - distanceTo(place, size, about)
  return candidates.length === 0 ? { x: frame.x, y: frame.y } : best(candidates, merit)
}

function between(from: Point, to: Point, share: number): Point {
  return { x: from.x + share * (to.x - from.x), y: from.y + share * (to.y - from.y) }
}

/** From a rectangle with its upper left corner at `corner` to a point; 0 inside. */
function distanceTo(corner: Point, size: Pick<Box, 'width' | 'height'>, point: Point): number {
  const dx = Math.max(corner.x - point.x, 0, point.x - corner.x - size.width)
  const dy = Math.max(corner.y - point.y, 0, point.y - corner.y - size.height)
  return Math.sqrt(dx * dx + dy * dy)
}

function nearest(place: Point, points: readonly Point[]): number {
  let least = Infinity
  for (const { x, y } of points) {
    const square = (x - place.x) ** 2 + (y - place.y) ** 2
    if (square < least) least = square
  }
  return Math.sqrt(least)
}

function best(candidates: readonly Point[], merit: (place: Point) => number): Point {
  let [chosen, most] = [candidates[0], -Infinity]
  for (const candidate of candidates) {
    const worth = merit(candidate)
    if (worth > most) [chosen, most] = [candidate, worth]
  }
  return chosen
}
