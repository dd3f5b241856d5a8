/** A histogram and what was clipped, merged, filled or inferred on the way to it, in sentences. */
export interface ReadResult<Result> {
  readonly histogram: Result
  readonly notes: readonly string[]
}
