import { binMidpoints, binVolumes, jacobian } from '../histogram'
import { smoothCounts } from '../smoothing'
import type { CoordinateKind } from '../units'
import type { MergedBins } from './merge-bins'

/** Most cells a side of the grid that basins are looked for on; file bins are merged by whole numbers to come below it. */
const MOST_CELLS = 48
/** A smooth curve needs this many bins, and data in this many. */
const LEAST_CELLS = 5

/** One coordinate alone, smoothed: one axis of the grid that basins are looked for on. */
export interface BasinAxis extends MergedBins {
  readonly midpoints: Float64Array
  /** Independent samples in each cell of the axis. */
  readonly counts: Float64Array
  /** −ln of the smooth density per volume at the midpoints, kT. */
  readonly energies: Float64Array
  /** Standard deviation of each energy less that of the most likely cell, kT. */
  readonly deviations: Float64Array
  /** Whether the cells fill a turn. */
  readonly periodic: boolean
  /** Spread of the density, 1/(2√π ∫p²): the standard deviation of a normal one; several narrow peaks count together. */
  readonly spread: number
}

/**
 * Merges the bins of a coordinate to at most 48 cells of equal numbers of bins and smooths their counts as an inversion does.
 *
 * @param counts independent samples in each bin of the file
 * @param edges length n + 1
 * @returns null where fewer than 5 cells hold data
 * @throws {InvalidInputError} SINGULAR_SYSTEM when the counts do not determine a curve
 */
export function basinAxis(kind: CoordinateKind, counts: Float64Array, edges: Float64Array): BasinAxis | null {
  const periodic = kind === 'dihedral' && edges[edges.length - 1] - edges[0] > 2 * Math.PI * (1 - 1e-9)
  const merged = mergeEvenly(counts, edges, periodic)
  const inCells = new Float64Array(merged.count)
  counts.forEach((count, bin) => {
    if (merged.groups[bin] >= 0) inCells[merged.groups[bin]] += count
  })
  if (inCells.filter((count) => count > 0).length < LEAST_CELLS) return null
  const midpoints = binMidpoints(merged.edges)
  const geometry = {
    edges: merged.edges,
    midpoints,
    volumes: binVolumes(kind, merged.edges),
    jacobian: (coordinate: number) => jacobian(kind, coordinate),
    period: periodic ? 2 * Math.PI : null,
    mirrored: false,
  }
  const { eta, deviations } = smoothCounts(geometry, inCells, { by: 'likelihood' })
  return {
    ...merged,
    midpoints,
    counts: inCells,
    energies: eta.map((value) => -value),
    deviations,
    periodic,
    spread: spreadOf(inCells, merged.edges),
  }
}

/** From the first to the last bin that holds data; all of a turn. */
function mergeEvenly(counts: Float64Array, edges: Float64Array, whole: boolean): MergedBins {
  const first = whole ? 0 : counts.findIndex((count) => count > 0)
  const last = whole ? counts.length - 1 : counts.findLastIndex((count) => count > 0)
  const size = Math.ceil((last + 1 - first) / MOST_CELLS)
  const count = Math.ceil((last + 1 - first) / size)
  const groups = new Int32Array(counts.length).fill(-1)
  for (let bin = first; bin <= last; bin++) groups[bin] = Math.floor((bin - first) / size)
  const starts = Float64Array.from(
    { length: count + 1 },
    (_, cell) => edges[Math.min(first + cell * size, last + 1)],
  )
  return { groups, edges: starts, count }
}

function spreadOf(counts: Float64Array, edges: Float64Array): number {
  const total = counts.reduce((sum, count) => sum + count, 0)
  const squares = counts.reduce(
    (sum, count, cell) => sum + (count / total) ** 2 / (edges[cell + 1] - edges[cell]),
    0,
  )
  return 1 / (2 * Math.sqrt(Math.PI) * squares)
}
