import type { PreparedBins } from './prepared-bins'

/** An empty run is a barrier when it is at least this share of the populated range, or of the turn. */
const LEAST_WIDTH = 1 / 30
/** Both sides of a barrier hold at least this share of the samples, and this many: fewer are stragglers. */
const SIDE_SHARE = 0.01
const SIDE_COUNTS = 20

/** A run of empty bins: first bin and one past the last; a run over ±180° of a dihedral has `end` below `first`. */
type Run = readonly [first: number, end: number]

/** Wide empty runs of a bond or an angle with populations on both sides. */
export function openBarriers({ counts, edges, filled: [first, last] }: PreparedBins): Run[] {
  const total = sum(counts, 0, counts.length)
  const least = Math.max(SIDE_COUNTS, SIDE_SHARE * total)
  const width = LEAST_WIDTH * (edges[last + 1] - edges[first])
  return emptyRuns(counts).filter(([from, to]) => {
    const below = sum(counts, 0, from)
    return edges[to] - edges[from] >= width && below >= least && total - below >= least
  })
}

/**
 * Wide empty runs of a dihedral, with populations between one run and the next around the turn; two at least, since a
 * single one has the same well on both sides.
 */
export function turnBarriers({ counts, edges }: PreparedBins): Run[] {
  const total = sum(counts, 0, counts.length)
  const least = Math.max(SIDE_COUNTS, SIDE_SHARE * total)
  const bins = counts.length
  const wide = joinOverTurn(emptyRuns(counts), bins).filter(([from, to]) => {
    const width = edges[to] - edges[from] + (to < from ? 2 * Math.PI : 0)
    return width >= LEAST_WIDTH * 2 * Math.PI
  })
  const between = wide.map(([, end], place) => {
    const [next] = wide[(place + 1) % wide.length]
    return next >= end ? sum(counts, end, next) : sum(counts, end, bins) + sum(counts, 0, next)
  })
  return between.filter((samples) => samples >= least).length >= 2 ? wide : []
}

function emptyRuns(counts: Float64Array): Run[] {
  const runs: Run[] = []
  let start = 0
  for (let bin = 0; bin <= counts.length; bin++) {
    if (bin < counts.length && counts[bin] === 0) continue
    if (bin > start) runs.push([start, bin])
    start = bin + 1
  }
  return runs
}

/** A run that ends at +180° and one that begins at −180° are one. */
function joinOverTurn(runs: readonly Run[], bins: number): Run[] {
  const [first] = runs
  const last = runs[runs.length - 1]
  if (runs.length < 2 || first[0] !== 0 || last[1] !== bins) return [...runs]
  return [...runs.slice(1, -1), [last[0], first[1]]]
}

function sum(counts: Float64Array, from: number, to: number): number {
  let total = 0
  for (let bin = from; bin < to; bin++) total += counts[bin]
  return total
}
