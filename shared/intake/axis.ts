import type { CoordinateKind } from '../histogram/histogram'
import type { CoordinateUnit } from '../units'
import { shortCoordinate } from './coordinate-values'
import type { FileGrid } from './file-grid'

/** The bins of a histogram in its domain, each a piece of a bin of the file's grid. */
export interface Axis {
  /** Internal units, inside the domain of the kind. */
  readonly edges: Float64Array
  /** Per bin, the bin of the file's grid it comes from; −1 for a bin added to close a gap. */
  readonly sources: Int32Array
  /** Per bin, its share of that bin of the grid, in (0, 1]; the shares of one source sum to 1. */
  readonly shares: Float64Array
  readonly notes: readonly string[]
}

interface Piece {
  low: number
  high: number
  source: number
  share: number
}

const TURN = 2 * Math.PI

/**
 * Brings a file's grid into the domain of its kind: bins that reach beyond 0°, 180° or r = 0 are clipped there and keep
 * all they hold; a dihedral is folded into [−π, π), and a bin across the seam at ±180° is cut in two.
 *
 * @param unit the file's unit, for the notes
 */
export function axisInDomain(kind: CoordinateKind, unit: CoordinateUnit, grid: FileGrid): Axis {
  const notes = [...grid.notes]
  const edges = Float64Array.from(grid.edges)
  if (kind === 'bond') clip(edges, grid.slack, [0, Infinity], unit, notes)
  if (kind === 'angle') clip(edges, grid.slack, [0, Math.PI], unit, notes)
  if (kind !== 'dihedral') return { ...whole(edges), notes }
  return fold(edges, grid, unit, notes)
}

function whole(edges: Float64Array): Omit<Axis, 'notes'> {
  const size = edges.length - 1
  return {
    edges,
    sources: Int32Array.from({ length: size }, (_, bin) => bin),
    shares: new Float64Array(size).fill(1),
  }
}

function clip(
  edges: Float64Array,
  slack: number,
  [low, high]: readonly [number, number],
  unit: CoordinateUnit,
  notes: string[],
): void {
  const last = edges.length - 1
  if (edges[0] < low - slack) notes.push(`The first bin is clipped at ${shortCoordinate(low, unit)}.`)
  if (edges[last] > high + slack) notes.push(`The last bin is clipped at ${shortCoordinate(high, unit)}.`)
  if (edges[0] < low + slack) edges[0] = low
  if (edges[last] > high - slack) edges[last] = high
}

function fold(
  edges: Float64Array,
  { doubled, slack }: FileGrid,
  unit: CoordinateUnit,
  notes: string[],
): Axis {
  const size = edges.length - 1 - (doubled ? 1 : 0)
  if (doubled) {
    notes.push('The first and the last row are one bin, a full turn apart: they are merged.')
  } else if (edges[size] - edges[0] > TURN + slack) {
    // A width that does not divide the turn: the bins at both ends would overlap once folded.
    const low = edges[0] < -Math.PI / 2 ? -Math.PI : 0
    clip(edges, slack, [low, low + TURN], unit, notes)
  }
  const pieces: Piece[] = []
  for (let source = 0; source < size; source++)
    cutAtSeam([edges[source], edges[source + 1]], source, slack, pieces)
  pieces.sort((a, b) => a.low - b.low)
  if (pieces.length > size) notes.push('The bin across ±180° is cut in two at the seam.')
  return { ...joined(pieces, slack, notes), notes }
}

/** The pieces of one bin in [−π, π], moved by full turns. */
function cutAtSeam(
  [low, high]: readonly [number, number],
  source: number,
  close: number,
  pieces: Piece[],
): void {
  const width = high - low
  const turns = Math.floor((low + close + Math.PI) / TURN)
  const [from, to] = [low - turns * TURN, high - turns * TURN]
  const start = Math.abs(from + Math.PI) <= close ? -Math.PI : from
  if (to <= Math.PI + close) {
    pieces.push({ low: start, high: to >= Math.PI - close ? Math.PI : to, source, share: 1 })
    return
  }
  // Nine digits are more than a file has, and they make half a bin exactly half.
  const share = Math.round(((Math.PI - from) / width) * 1e9) / 1e9
  pieces.push({ low: start, high: Math.PI, source, share })
  pieces.push({ low: -Math.PI, high: to - TURN, source, share: 1 - share })
}

/** Lays sorted pieces side by side; a gap left by a grid over part of a 0…360° turn becomes empty bins. */
function joined(pieces: readonly Piece[], slack: number, notes: string[]): Omit<Axis, 'notes'> {
  const typical = pieces[0].high - pieces[0].low
  const edges = [pieces[0].low]
  const sources: number[] = []
  const shares: number[] = []
  let added = 0
  for (const piece of pieces) {
    const end = edges[edges.length - 1]
    const gap = piece.low - end
    if (gap > slack) {
      const count = Math.max(1, Math.round(gap / typical))
      for (let bin = 1; bin <= count; bin++) {
        edges.push(end + (gap * bin) / count)
        sources.push(-1)
        shares.push(1)
      }
      added += count
    }
    edges.push(piece.high)
    sources.push(piece.source)
    shares.push(piece.share)
  }
  if (added > 0) notes.push(`${added} empty bins close the part of the turn that the file leaves out.`)
  return {
    edges: Float64Array.from(edges),
    sources: Int32Array.from(sources),
    shares: Float64Array.from(shares),
  }
}
