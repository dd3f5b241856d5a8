import {
  inverse,
  moved,
  type Isometry,
  type Point,
  type RepeatUnit,
  type RepeatUnitLayout,
} from '../chemistry'

/** Length of a bond on the board. */
export const BOND_LENGTH = 50
/** Half the width of a halo. */
export const HALO_RADIUS = 20
const MARGIN = 44

/** The drawing of a repeat unit between its neighbours, in px; y points down. */
export interface BoardLayout {
  readonly positions: readonly Point[]
  /** Where the neighbours' nearest atoms stand, head first. */
  readonly ends: readonly [Point, Point]
  /** Carries the unit onto the one before and the one after. */
  readonly neighbours: readonly [Isometry, Isometry]
  /** How the drawing was turned and mirrored from the level one. */
  readonly turn: Isometry
  /** Atoms that the neighbours show: the backbone with its rings; side groups are left out. */
  readonly backbone: ReadonlySet<number>
  readonly box: Box
}

export interface Box {
  readonly x: number
  readonly y: number
  readonly width: number
  readonly height: number
}

/** As laid out. */
const LEVEL: Isometry = { a: 1, b: 0, c: 0, d: 1, e: 0, f: 0 }

/**
 * Scales a layout to the board and frames it with its neighbours.
 *
 * @param turn turns or mirrors the drawing about the origin
 */
export function boardLayout(unit: RepeatUnit, layout: RepeatUnitLayout, turn = LEVEL): BoardLayout {
  const scaled = ({ x, y }: Point): Point => moved(turn, { x: x * BOND_LENGTH, y: y * BOND_LENGTH })
  const level = { ...layout.next, e: layout.next.e * BOND_LENGTH, f: layout.next.f * BOND_LENGTH }
  const next = product(product(turn, level), inverse(turn))
  const positions = layout.positions.map(scaled)
  const neighbours = [inverse(next), next] as const
  const backbone = backboneAtoms(unit)
  const ghosts = neighbours.flatMap((motion) => [...backbone].map((atom) => moved(motion, positions[atom])))
  return {
    positions,
    ends: [scaled(layout.ends[0]), scaled(layout.ends[1])],
    neighbours,
    turn,
    backbone,
    box: frame([...positions, ...ghosts]),
  }
}

/** Where the atoms of a unit are drawn, counted from the drawn one. */
export function positionsIn(board: BoardLayout, unit: number): readonly Point[] {
  return unit === 0 ? board.positions : board.positions.map((_, atom) => atomPoint(board, atom, unit))
}

/** Where an atom of a unit is drawn, counted from the drawn one. */
export function atomPoint(
  { positions, neighbours: [before, after] }: BoardLayout,
  atom: number,
  unit: number,
): Point {
  let point = positions[atom]
  for (let step = 0; step < Math.abs(unit); step++) point = moved(unit < 0 ? before : after, point)
  return point
}

/** The atoms on the shortest path from head to tail, with all rings that it runs through. */
export function backboneAtoms({ atoms, bonds, attachments: [head, tail], rings }: RepeatUnit): Set<number> {
  const before = new Map<number, number>([[head, head]])
  const queue = [head]
  for (const atom of queue) {
    for (const { from, to } of bonds) {
      const other = from === atom ? to : to === atom ? from : null
      if (other === null || before.has(other)) continue
      before.set(other, atom)
      queue.push(other)
    }
  }
  const path = new Set<number>()
  for (let atom = tail; path.size < atoms.length; atom = before.get(atom) ?? head) {
    path.add(atom)
    if (atom === head) break
  }
  const joined = rings.filter((ring) => ring.filter((atom) => path.has(atom)).length > 1)
  return new Set([...path, ...joined.flat()])
}

/** The motion that does the second, then the first. */
function product(first: Isometry, second: Isometry): Isometry {
  const linear = (x: number, y: number): Point => moved({ ...first, e: 0, f: 0 }, { x, y })
  const [along, down] = [linear(second.a, second.b), linear(second.c, second.d)]
  const { x, y } = moved(first, { x: second.e, y: second.f })
  return { a: along.x, b: along.y, c: down.x, d: down.y, e: x, f: y }
}

function frame(points: readonly Point[]): Box {
  const [xs, ys] = [points.map(({ x }) => x), points.map(({ y }) => y)]
  const [left, top] = [Math.min(...xs) - MARGIN, Math.min(...ys) - MARGIN]
  return { x: left, y: top, width: Math.max(...xs) + MARGIN - left, height: Math.max(...ys) + MARGIN - top }
}
