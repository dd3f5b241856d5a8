/** What a step of Newton's method is judged by, bin by bin. */
export interface NewtonState {
  readonly eta: Float64Array
  /** Expected counts. */
  readonly means: Float64Array
}

/**
 * How far a step went: `moved` is the largest change of η, `felt` the largest that counts speak about, weighted by √μ where
 * less than one count is expected. NaN in η makes both NaN, so that no such step looks converged.
 */
export function newtonStep(before: NewtonState, after: NewtonState): { moved: number; felt: number } {
  let [moved, felt] = [0, 0]
  for (let bin = 0; bin < after.eta.length; bin++) {
    const change = Math.abs(after.eta[bin] - before.eta[bin])
    moved = Math.max(moved, change)
    felt = Math.max(felt, change * Math.sqrt(Math.min(1, after.means[bin])))
  }
  return { moved, felt }
}
