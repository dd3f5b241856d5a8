import { binVolumes, type CoordinateKind, jacobian } from '../histogram'
import { GAUSS_LEGENDRE } from '../numeric'

/** Most cells a tail is divided into. */
const TAIL_CELLS = 40

/** With more bins than this they are so narrow that three points integrate as well as five. */
const FINE_BINS = 100
/** Gauss–Legendre rule with three points (Abramowitz & Stegun, table 25.4), exact up to degree 5. */
const THREE_POINTS = [
  { node: -Math.sqrt(3 / 5), weight: 5 / 9 },
  { node: 0, weight: 8 / 9 },
  { node: Math.sqrt(3 / 5), weight: 5 / 9 },
]

/** What a layout of cells needs to know beside edges and counts. */
export interface CellRegion {
  readonly kind: CoordinateKind
  /** false takes J = 1. */
  readonly useJacobian: boolean
  /** First and last coordinate that a form is normalised over; the edges lie inside. */
  readonly region: readonly [low: number, high: number]
}

/**
 * Cells with their quadrature points: a lower tail, the bins, an upper tail.
 *
 * @param edges of the bins, nm or rad
 * @param counts of the bins, any common factor
 */
export function layOut({ kind, useJacobian, region }: CellRegion, edges: Float64Array, counts: Float64Array) {
  const total = counts.reduce((sum, count) => sum + count, 0)
  const last = edges[edges.length - 1]
  const width = (last - edges[0]) / counts.length
  const below = divide(region[0], edges[0], width)
  const own = Array.from(counts, (_, bin): [number, number] => [edges[bin], edges[bin + 1]])
  const cells = [...below, ...own, ...divide(last, region[1], width)]
  const shares = new Float64Array(cells.length)
  counts.forEach((count, bin) => (shares[below.length + bin] = count / total))
  const middle = (bin: number) => (edges[bin] + edges[bin + 1]) / 2
  const mean = counts.reduce((sum, count, bin) => sum + count * middle(bin), 0) / total
  const square = counts.reduce((sum, count, bin) => sum + count * (middle(bin) - mean) ** 2, 0) / total
  return {
    kind,
    useJacobian,
    region,
    ...quadrature(kind, cells, useJacobian),
    shares,
    bins: [below.length, below.length + counts.length] as const,
    edges,
    volumes: binVolumes(kind, edges, useJacobian),
    filledBins: counts.reduce((sum, count) => sum + (count > 0 ? 1 : 0), 0),
    mean,
    deviation: Math.sqrt(square),
  }
}

function divide(low: number, high: number, width: number): [number, number][] {
  if (!(high > low)) return []
  const cells = Math.min(TAIL_CELLS, Math.ceil((high - low) / width))
  const edge = (index: number) => low + ((high - low) * index) / cells
  return Array.from({ length: cells }, (_, cell) => [edge(cell), edge(cell + 1)])
}

function quadrature(kind: CoordinateKind, cells: readonly [number, number][], useJacobian: boolean) {
  const rule = cells.length > FINE_BINS ? THREE_POINTS : GAUSS_LEGENDRE
  const pointsPerCell = rule.length
  const points = new Float64Array(cells.length * pointsPerCell)
  const measures = new Float64Array(points.length)
  cells.forEach(([low, high], cell) => {
    const half = (high - low) / 2
    rule.forEach(({ node, weight }, index) => {
      const place = cell * pointsPerCell + index
      points[place] = low + half + node * half
      measures[place] = weight * half * (useJacobian ? jacobian(kind, points[place]) : 1)
    })
  })
  return { points, pointsPerCell, measures }
}
