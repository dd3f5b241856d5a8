import type { LinearScale } from '@/components/figure/linear-scale'
import type { EmptyRun } from './empty-bins'

/** An open bracket on the spine, from one pixel to another. */
export interface Bracket {
  readonly from: number
  readonly to: number
}

/** Brackets for bins without counts, and where the words "no counts" stand; null where no run is wide enough for them. */
export interface EmptyBrackets {
  readonly brackets: readonly Bracket[]
  readonly labelAt: number | null
}

const GAP = 1.2
/** Narrower bins share one bracket per run. */
const LEAST_BIN_WIDTH = 5
const LABEL_WIDTH = 62

/** Brackets of the empty runs that lie in the shown range. */
export function emptyBrackets(
  runs: readonly EmptyRun[],
  edges: ArrayLike<number>,
  x: LinearScale,
): EmptyBrackets {
  const [left, right] = x.range
  const span = (first: number, last: number): Bracket => ({
    from: Math.max(left, x.at(edges[first])) + GAP,
    to: Math.min(right, x.at(edges[last + 1])) - GAP,
  })
  const shown = runs
    .map(({ first, last }) => ({ first, last, ...span(first, last) }))
    .filter(({ from, to }) => to > from)
  const brackets = shown.flatMap(({ first, last }) => {
    const whole = span(first, last)
    if ((whole.to - whole.from) / (last - first + 1) < LEAST_BIN_WIDTH) return [whole]
    return Array.from({ length: last - first + 1 }, (_, index) => span(first + index, first + index)).filter(
      ({ from, to }) => to > from,
    )
  })
  const widest = shown.reduce<Bracket | null>(
    (best, run) => (best === null || run.to - run.from > best.to - best.from ? run : best),
    null,
  )
  const fits = widest !== null && widest.to - widest.from >= LABEL_WIDTH
  return { brackets, labelAt: fits ? (widest.from + widest.to) / 2 : null }
}
