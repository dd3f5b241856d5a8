import type { Point, RepeatUnitBond } from '../chemistry'

/** Distance between the lines of a double bond, and between the outer ones of a triple bond and the middle. */
const SPREAD = 2.6
/** Room that a letter takes from a bond. */
const LETTER_ROOM = 12

/** One line of a bond. */
export interface BondLine {
  readonly from: Point
  readonly to: Point
}

/**
 * The lines of a bond: one, two side by side, or three; shortened where an atom shows its letter.
 *
 * @param lettered whether the atom at an index shows a letter
 */
export function bondLines(
  { from, to, order }: RepeatUnitBond,
  positions: readonly Point[],
  lettered: (atom: number) => boolean,
): BondLine[] {
  const [start, end] = [positions[from], positions[to]]
  const length = Math.hypot(end.x - start.x, end.y - start.y)
  const along = { x: (end.x - start.x) / length, y: (end.y - start.y) / length }
  const first = lettered(from) ? LETTER_ROOM : 0
  const last = lettered(to) ? LETTER_ROOM : 0
  const offsets = order === 1 ? [0] : order === 2 ? [-SPREAD, SPREAD] : [-2 * SPREAD, 0, 2 * SPREAD]
  return offsets.map((offset) => ({
    from: {
      x: start.x + first * along.x - offset * along.y,
      y: start.y + first * along.y + offset * along.x,
    },
    to: { x: end.x - last * along.x - offset * along.y, y: end.y - last * along.y + offset * along.x },
  }))
}
