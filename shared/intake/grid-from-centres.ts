import { InvalidInputError } from '../errors'
import type { CoordinateKind } from '../histogram/histogram'
import type { CoordinateUnit } from '../units'
import { shortCoordinate } from './coordinate-values'
import type { FileGrid } from './file-grid'
import { MAX_BINS } from './intake-settings'
import { fitUniformGrid } from './uniform-grid'

/** Rounding of printed centres moves the edges found from them by up to this share of a bin. */
const SLACK = 0.02

const TURN = 2 * Math.PI

/** Widths of neighbouring bins of an uneven grid may differ by this factor; beyond it the edges are guesswork. */
const WIDEST_STEP = 3

/**
 * The bins whose centres a file states. On an even grid bins without a row are empty. On an uneven grid the edges follow
 * from the centres being the middles of their bins, up to one number, which is chosen so that the widths of neighbours
 * differ least; where that gives no sensible bins, the file has to state both edges.
 *
 * @param centres ascending, internal units, at least two
 * @param unit the file's unit, for the notes
 * @throws {InvalidInputError} TOO_FEW_BINS, TOO_MANY_BINS, BIN_WIDTH_UNKNOWN
 */
export function gridFromCentres(kind: CoordinateKind, unit: CoordinateUnit, centres: Float64Array): FileGrid {
  if (centres.length < 2) {
    throw new InvalidInputError(
      'TOO_FEW_BINS',
      'A single bin centre says nothing about the width of its bin.',
    )
  }
  const grid = fitUniformGrid(centres)
  if (grid === null) return unevenGrid(unit, centres)
  const { start, width, size, places } = grid
  if (size > MAX_BINS) throw tooManyBins(size)
  const edges = Float64Array.from({ length: size + 1 }, (_, edge) => start + (edge - 0.5) * width)
  const notes: string[] = []
  const missing = size - centres.length
  if (missing > 0) {
    notes.push(
      `${missing === 1 ? 'One row is' : `${missing} rows are`} left out of an even grid of ` +
        `${shortCoordinate(width, unit)}: the bins are empty.`,
    )
  }
  const doubled = kind === 'dihedral' && Math.abs((size - 1) * width - TURN) < 0.1 * width
  return { edges, places, slack: SLACK * width, doubled, notes }
}

/** The error of a histogram with more bins than the product takes. */
export function tooManyBins(found: number): InvalidInputError {
  return new InvalidInputError(
    'TOO_MANY_BINS',
    `The file has ${found} bins; at most ${MAX_BINS} are read. Merge neighbouring bins, or give the samples themselves.`,
  )
}

/** Edges with every centre in the middle of its bin: e₀ is free, and e_{i+1} = 2cᵢ − eᵢ from there. */
function unevenGrid(unit: CoordinateUnit, centres: Float64Array): FileGrid {
  const n = centres.length
  const edges = new Float64Array(n + 1)
  edges[0] = centres[0] - (centres[1] - centres[0]) / 2
  fillEdges(edges, centres)
  // Moving e₀ by δ moves the edges by ±δ in turn. The δ below makes the median change of width from bin to bin zero,
  // which finds the edges of a piecewise even grid exactly.
  const changes = new Float64Array(n - 1)
  for (let i = 0; i + 1 < n; i++) {
    const change = edges[i + 2] - 2 * edges[i + 1] + edges[i]
    changes[i] = i % 2 === 0 ? -change / 4 : change / 4
  }
  changes.sort()
  edges[0] += (changes[(n - 2) >> 1] + changes[(n - 1) >> 1]) / 2
  fillEdges(edges, centres)
  if (!plausible(edges)) {
    throw new InvalidInputError(
      'BIN_WIDTH_UNKNOWN',
      'The bin centres are unevenly spaced, so the widths of the bins do not follow from them. Give the lower and the ' +
        'upper edge of each bin in two columns.',
    )
  }
  const widths = Array.from({ length: n }, (_, i) => edges[i + 1] - edges[i])
  return {
    edges,
    places: Int32Array.from({ length: n }, (_, i) => i),
    slack: SLACK * Math.min(...widths),
    doubled: false,
    notes: [
      'The centres are unevenly spaced. The edges were rebuilt with each centre in the middle of its bin; the widths run ' +
        `from ${shortCoordinate(Math.min(...widths), unit)} to ${shortCoordinate(Math.max(...widths), unit)}.`,
    ],
  }
}

function fillEdges(edges: Float64Array, centres: Float64Array): void {
  for (let i = 0; i < centres.length; i++) edges[i + 1] = 2 * centres[i] - edges[i]
}

function plausible(edges: Float64Array): boolean {
  let previous = edges[1] - edges[0]
  for (let i = 0; i + 1 < edges.length; i++) {
    const width = edges[i + 1] - edges[i]
    if (!(width > 0) || width > WIDEST_STEP * previous || previous > WIDEST_STEP * width) return false
    previous = width
  }
  return true
}
