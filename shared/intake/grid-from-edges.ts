import { InvalidInputError } from '../errors'
import type { CoordinateUnit } from '../units'
import { shortCoordinate } from './coordinate-values'
import type { FileGrid } from './file-grid'

/** Two edges that should be one may differ by this share of a bin, from the rounding of printed digits. */
const SAME_EDGE = 0.02

/** Edges are meant as they stand; only what a conversion of units leaves behind is rounding. */
const SLACK = 1e-9

/**
 * The bins whose two edges a file states. Bins that are left out between two others are empty where the grid is even.
 *
 * @param lows lower edges in the order of the file, internal units
 * @param highs upper edges, same length
 * @param lines line of each bin, for errors
 * @param unit the file's unit, for the notes
 * @throws {InvalidInputError} BINS_NOT_ASCENDING, BINS_OVERLAP, BINS_GAP, each with its line
 */
export function gridFromEdges(
  unit: CoordinateUnit,
  lows: Float64Array,
  highs: Float64Array,
  lines: Int32Array,
): FileGrid {
  const edges = [lows[0]]
  const places = new Int32Array(lows.length)
  let filled = 0
  for (let row = 0; row < lows.length; row++) {
    const [low, high, line] = [lows[row], highs[row], lines[row]]
    const width = high - low
    if (!(width > 0)) {
      throw broken('BINS_NOT_ASCENDING', line, 'the upper edge of the bin is not above its lower edge')
    }
    const end = edges[edges.length - 1]
    if (row > 0 && Math.abs(low - end) > SAME_EDGE * width) {
      if (low <= lows[row - 1])
        throw broken('BINS_NOT_ASCENDING', line, 'the bin does not lie above the one before it')
      if (low < end) throw broken('BINS_OVERLAP', line, 'the bin overlaps the one before it')
      filled += fillGap(edges, low, width, line)
    }
    places[row] = edges.length - 1
    edges.push(high)
  }
  const notes =
    filled === 0
      ? []
      : [
          `${filled === 1 ? 'One bin is' : `${filled} bins are`} left out of an even grid of ` +
            `${shortCoordinate(highs[0] - lows[0], unit)}: empty.`,
        ]
  return {
    edges: Float64Array.from(edges),
    places,
    slack: SLACK * (highs[0] - lows[0]),
    doubled: false,
    notes,
  }
}

/** Adds empty bins as wide as the bins on both sides of a gap; their number, or the gap is refused. */
function fillGap(edges: number[], low: number, width: number, line: number): number {
  const end = edges[edges.length - 1]
  const before = end - edges[edges.length - 2]
  const count = Math.round((low - end) / width)
  const even =
    count > 0 &&
    Math.abs(before - width) < 2 * SAME_EDGE * width &&
    Math.abs(end + count * width - low) < 0.1 * width
  if (!even) {
    throw broken('BINS_GAP', line, 'there is a gap below this bin; state the empty bins too')
  }
  for (let bin = 1; bin < count; bin++) edges.push(end + (bin * (low - end)) / count)
  edges.push(low)
  return count
}

function broken(
  code: 'BINS_NOT_ASCENDING' | 'BINS_OVERLAP' | 'BINS_GAP',
  line: number,
  why: string,
): InvalidInputError {
  return new InvalidInputError(code, `Line ${line}: ${why}.`, { line })
}
