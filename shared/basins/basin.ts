/** Our default: a basin counts from this depth on, in kT. */
export const LEAST_BASIN_DEPTH = 0.5

/** Our default: and only where its depth exceeds this many standard deviations of itself. */
export const BASIN_DEVIATIONS = 2

/** When a basin counts: its depth exceeds max(`depth`, `deviations` · σ). */
export interface BasinThreshold {
  /** kT, at least 0. */
  readonly depth: number
  /** In standard deviations of the depth, at least 0; 0 takes no notice of the band. */
  readonly deviations: number
}

/** The threshold unless somebody asks for another. */
export const DEFAULT_BASIN_THRESHOLD: BasinThreshold = {
  depth: LEAST_BASIN_DEPTH,
  deviations: BASIN_DEVIATIONS,
}

/** Number of basins at least this deep, the lowest one included. */
export interface BasinStep {
  /** kT */
  readonly depth: number
  readonly count: number
}

/** How the number of basins falls with the depth asked for. */
export interface BasinCurve {
  /** Basins that no way leads out of: one, and one more per region that walls cut off; 0 without data. They stay at any depth. */
  readonly lasting: number
  /** Descending depth, so rising count; where several basins are equally deep, one step. Noise is part of it. */
  readonly steps: readonly BasinStep[]
}

/**
 * How many basins are at least as deep as asked.
 *
 * @param depth kT, above 0
 * @example basinsAtDepth({ lasting: 1, steps: [{ depth: 2.1, count: 2 }] }, 0.5) // 2
 */
export function basinsAtDepth({ lasting, steps }: BasinCurve, depth: number): number {
  return steps.reduce((count, step) => (step.depth >= depth ? step.count : count), lasting)
}
