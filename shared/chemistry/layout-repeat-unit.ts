import { checkAttachments } from './check-attachments'
import { motion, moved, type Isometry, type Point } from './isometry'
import { scanSmiles } from './scan-smiles'
import type { SmilesGraph } from './smiles-graph'

/** Where the atoms of a repeat unit are drawn, and where its neighbours follow. Bonds are about 1 long; y points down. */
export interface RepeatUnitLayout {
  /** By atom index. */
  readonly positions: readonly Point[]
  /** Where the two attachment points lie, head first: the neighbours' nearest atoms are drawn there. */
  readonly ends: readonly [Point, Point]
  /** Carries the drawing onto the next unit of the chain: a shift to the right, mirrored where the zigzag asks for it. */
  readonly next: Isometry
}

/** What is read of the drawing library's graph; it ships no types for it. */
interface DrawnVertex {
  readonly position: Point
  readonly value: { readonly idx: number | null }
}

/** Units whose ends point the same way within this angle, in rad, repeat by a shift; others by a glide mirror. */
const PARALLEL = 0.09

/**
 * Two-dimensional positions with the backbone level, running from head to tail, and the side groups below. The drawing library
 * (57 kB compressed, loaded here) lays out the longest chain as a zigzag; so each `*` is given a tail longer than the unit.
 *
 * @param smiles one that `parseRepeatUnit` accepts
 * @throws {InvalidInputError} as `scanSmiles` and `checkAttachments` for others
 */
export async function layoutRepeatUnit(smiles: string): Promise<RepeatUnitLayout> {
  const text = smiles.trim()
  const graph = scanSmiles(text)
  const { points, anchors } = checkAttachments(graph)
  const drawn = await draw(text, graph)
  const place = (atom: number): Point => drawn[atom]
  const heavy = graph.atoms.flatMap(({ element }, index) =>
    element === '*' || element === 'H' ? [] : [index],
  )
  const raw = heavy.map(place)
  const ends = [place(points[0]), place(points[1])] as const
  const head = place(anchors[0])
  const tail = place(anchors[1])

  const level = levelling(raw, ends, head, tail)
  return {
    positions: raw.map((point) => moved(level, point)),
    ends: [moved(level, ends[0]), moved(level, ends[1])],
    next: step([moved(level, ends[0]), moved(level, head)], [moved(level, tail), moved(level, ends[1])]),
  }
}

/** Positions by atom of the graph, in bond lengths; none for explicit hydrogens. */
async function draw(smiles: string, graph: SmilesGraph): Promise<Point[]> {
  const { default: drawing } = await import('smiles-drawer')
  const bondLength = 30
  const { preprocessor } = new drawing.SvgDrawer({ bondLength, compactDrawing: false, terminalCarbons: true })
  const tailLength = graph.atoms.length
  preprocessor.initDraw(drawing.Parser.parse(withTails(smiles, graph, tailLength)), 'light', false, [])
  preprocessor.processGraph()
  const byIndex = new Map<number, Point>()
  for (const { position, value } of preprocessor.graph.vertices as DrawnVertex[]) {
    if (value.idx !== null) byIndex.set(value.idx, { x: position.x / bondLength, y: position.y / bondLength })
  }
  let index = 0
  return graph.atoms.map(({ element }) => {
    if (element === 'H') return { x: NaN, y: NaN }
    const point = byIndex.get(index) as Point
    index += element === '*' ? 1 + tailLength : 1
    return point
  })
}

function withTails(smiles: string, graph: SmilesGraph, length: number): string {
  let text = ''
  let done = 0
  for (const { element, start, end } of graph.atoms) {
    if (element !== '*') continue
    text += `${smiles.slice(done, start)}C(${'C'.repeat(length)})`
    done = end
  }
  return text + smiles.slice(done)
}

/** Turns the drawing so that the chain runs to the right; mirrors it when more of it lies above the backbone than below. */
function levelling(raw: readonly Point[], ends: readonly [Point, Point], head: Point, tail: Point): Isometry {
  const next = step([ends[0], head], [tail, ends[1]])
  const forward = { x: ends[1].x - ends[0].x, y: ends[1].y - ends[0].y }
  const mirrored = next.a * next.d - next.b * next.c < 0
  // A shift runs along its own vector, a glide mirror along its mirror line, at half its angle.
  const shift = { x: moved(next, head).x - head.x, y: moved(next, head).y - head.y }
  let along = mirrored ? Math.atan2(next.b, next.a) / 2 : Math.atan2(shift.y, shift.x)
  if (Math.cos(along) * forward.x + Math.sin(along) * forward.y < 0) along += Math.PI
  const turned = motion(-along, false, head, { x: 0, y: 0 })
  const middle = ends.reduce((sum, end) => sum + moved(turned, end).y, 0) / 2
  const hanging = raw.reduce((sum, point) => sum + moved(turned, point).y - middle, 0)
  return hanging >= 0 ? turned : { ...turned, b: -turned.b, d: -turned.d, f: -turned.f }
}

/** The motion that lays the bond into the unit over the bond out of it: by a shift if it can, else by a glide mirror. */
function step(entry: readonly [Point, Point], exit: readonly [Point, Point]): Isometry {
  const direction = ([from, to]: readonly [Point, Point]): number => Math.atan2(to.y - from.y, to.x - from.x)
  const [first, second] = [direction(entry), direction(exit)]
  const turn = Math.atan2(Math.sin(second - first), Math.cos(second - first))
  return Math.abs(turn) < PARALLEL
    ? motion(0, false, entry[1], exit[1])
    : motion(first + second, true, entry[1], exit[1])
}
