import { inverse, moved, type Point, type RepeatUnit } from '../chemistry'
import type { BoardLayout } from './board-layout'

const HALF_HEIGHT = 40
const ARM = 11

/** What marks the drawn unit between its neighbours. */
export interface UnitMarks {
  /** The four corners. */
  readonly path: string
  /** Where the n stands, by the middle of its foot line. */
  readonly n: Point
  /** The bonds to the neighbours. */
  readonly links: readonly { readonly from: Point; readonly to: Point }[]
}

/** Corner marks and n at the bonds to the neighbours: worked out where the chain is level, and turned with the drawing. */
export function unitMarks(unit: RepeatUnit, { positions, ends, turn, backbone }: BoardLayout): UnitMarks {
  const level = (point: Point): Point => moved(inverse(turn), point)
  const [head, tail] = unit.attachments.map((atom) => positions[atom])
  const left = (level(head).x + level(ends[0]).x) / 2
  const right = (level(tail).x + level(ends[1]).x) / 2
  const ys = [...backbone].map((atom) => level(positions[atom]).y)
  const [top, bottom] = [Math.min(...ys) - HALF_HEIGHT, Math.max(...ys) + HALF_HEIGHT]
  const corner = (x: number, y: number, dx: number, dy: number): string =>
    [
      { x: x + dx, y },
      { x, y },
      { x, y: y + dy },
    ]
      .map((point) => moved(turn, point))
      .map((point, index) => `${index === 0 ? 'M' : 'L'}${point.x.toFixed(1)} ${point.y.toFixed(1)}`)
      .join('')
  const n = moved(turn, { x: right + 9, y: bottom + 1 })
  return {
    path: [
      corner(left, top, 8, ARM),
      corner(left, bottom, 8, -ARM),
      corner(right, top, -8, ARM),
      corner(right, bottom, -8, -ARM),
    ].join(''),
    n: { x: n.x, y: n.y + 4 },
    links: [
      { from: head, to: ends[0] },
      { from: tail, to: ends[1] },
    ],
  }
}
