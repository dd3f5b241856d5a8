import { computed, shallowRef, watch, type ComputedRef } from 'vue'
import type { Distribution } from '@shared/contracts/distribution'
import type { Term } from '@shared/contracts/mapping'
import { straightAngleWarnings, type Warning } from '@shared/inversion'
import { anglesOf } from '@shared/mapping/angles-of'
import { findDistribution } from '@/api/distributions'
import { ApiError } from '@/api/http'

/**
 * Doubts about a dihedral one of whose two angles is often nearly straight, from the distributions of those angles at the same
 * state point. Angles without data, and ones that could not be loaded, say nothing.
 */
export function useStraightAngles(
  term: () => Term | null,
  terms: () => readonly Term[],
  statePointId: () => string | null,
): ComputedRef<readonly Warning[]> {
  const angles = computed(() => {
    const dihedral = term()
    return dihedral === null
      ? []
      : anglesOf(dihedral, terms()).filter((angle) => angle.distributionId !== null)
  })
  const question = computed(() =>
    JSON.stringify([statePointId(), angles.value.map(({ id, distributionId }) => [id, distributionId])]),
  )
  const found = shallowRef<readonly Distribution[]>([])

  watch(
    question,
    async (asked) => {
      found.value = []
      const at = statePointId()
      if (at === null || angles.value.length === 0) return
      const distributions = await Promise.all(angles.value.map(({ id }) => loaded(id, at)))
      if (asked === question.value) found.value = distributions.filter((each) => each !== null)
    },
    { immediate: true },
  )

  return computed(() =>
    straightAngleWarnings(
      found.value.map(({ kind, edges, weights, content, independentSamples }) => ({
        kind,
        edges: Float64Array.from(edges),
        weights: Float64Array.from(weights),
        content,
        independentSamples,
      })),
    ),
  )
}

async function loaded(termId: string, statePointId: string): Promise<Distribution | null> {
  try {
    return await findDistribution(termId, statePointId)
  } catch (failure) {
    if (!(failure instanceof ApiError)) throw failure
    return null
  }
}
