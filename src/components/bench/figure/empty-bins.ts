/** Neighbouring bins without counts: bins `first` to `last`, both included. */
export interface EmptyRun {
  readonly first: number
  readonly last: number
}

/** Runs of bins without counts, in ascending order. */
export function emptyRuns(weights: ArrayLike<number>): EmptyRun[] {
  const runs: EmptyRun[] = []
  for (let bin = 0; bin < weights.length; bin += 1) {
    if (weights[bin] > 0) continue
    const open = runs.at(-1)
    if (open !== undefined && open.last === bin - 1) runs[runs.length - 1] = { first: open.first, last: bin }
    else runs.push({ first: bin, last: bin })
  }
  return runs
}

/** First and last bin with counts. A histogram always has some. */
export function populatedBins(weights: ArrayLike<number>): EmptyRun {
  let first = 0
  let last = weights.length - 1
  while (first < last && !(weights[first] > 0)) first += 1
  while (last > first && !(weights[last] > 0)) last -= 1
  return { first, last }
}
