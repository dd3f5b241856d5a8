import type { Histogram } from './histogram'

/** Where a statistical inefficiency comes from; 'assumed' is 1 for counts that nobody said anything about. */
export type InefficiencySource = 'stated' | 'independent samples' | 'time blocks' | 'chains' | 'assumed'

/** The statistical inefficiency that counts are divided by. */
export interface AppliedInefficiency {
  readonly value: number
  readonly source: InefficiencySource
  /** Standard deviation of the value; null unless it was measured. */
  readonly deviation: number | null
}

/**
 * Number of independent samples a histogram stands for. Counts are divided by g, and the first of these that is there says
 * what g is: the user's own g; the number of independent samples stated with the distribution; g from blocks or chains; 1,
 * the counts taken as independent. A density or a probability has no counts to divide: only a stated number helps it.
 *
 * @param stated the user's own g, at least 1; null for none
 * @returns null for both where nobody knows; the inefficiency is null for a density or a probability
 */
export function effectiveSamples(
  { content, weights, independentSamples, blocks }: Histogram,
  stated: number | null,
): { independentSamples: number | null; inefficiency: AppliedInefficiency | null } {
  if (content !== 'count') return { independentSamples, inefficiency: null }
  const total = weights.reduce((sum, count) => sum + count, 0)
  const inefficiency = applied(total, stated, independentSamples, blocks ?? null)
  // A stated number is kept to its last digit.
  const kept = inefficiency.source === 'independent samples' ? independentSamples : null
  return { independentSamples: kept ?? total / inefficiency.value, inefficiency }
}

function applied(
  total: number,
  stated: number | null,
  independentSamples: number | null,
  blocks: NonNullable<Histogram['blocks']> | null,
): AppliedInefficiency {
  if (stated !== null) return { value: stated, source: 'stated', deviation: null }
  if (independentSamples !== null) {
    return { value: total / independentSamples, source: 'independent samples', deviation: null }
  }
  if (blocks === null) return { value: 1, source: 'assumed', deviation: null }
  const { kind, inefficiency, deviation } = blocks
  return { value: inefficiency, source: kind === 'time' ? 'time blocks' : 'chains', deviation }
}
