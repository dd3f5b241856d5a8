import { computed, shallowRef, watch, type ComputedRef, type ShallowRef } from 'vue'
import type { Pair } from '@shared/contracts/distribution'
import { listPairs } from '@/api/joint-distributions'

/** The pairs of a mapping at a state point, and the one the address names. */
export interface CorrelationPairs {
  readonly pairs: Readonly<ShallowRef<readonly Pair[] | null>>
  readonly error: Readonly<ShallowRef<Error | null>>
  /** The pair named, else the first with data, else the first; null while nothing is loaded or there is none. */
  readonly chosen: ComputedRef<Pair | null>
  readonly reload: () => Promise<void>
}

/** A pair in an address: both term ids. */
export const pairKey = (pair: Pick<Pair, 'firstTermId' | 'secondTermId'>): string =>
  `${pair.firstTermId}~${pair.secondTermId}`

/**
 * Loads the pairs whenever mapping or state point change; only the answer to the newest question counts.
 *
 * @param place ids of mapping and state point, null while they are not known
 * @param named what the address names, as `pairKey` writes it
 */
export function useCorrelationPairs(
  place: () => { mappingId: string; statePointId: string } | null,
  named: () => string | null,
): CorrelationPairs {
  const pairs = shallowRef<readonly Pair[] | null>(null)
  const error = shallowRef<Error | null>(null)
  let asked = 0

  const reload = async (): Promise<void> => {
    const at = place()
    const question = ++asked
    error.value = null
    if (at === null) return
    try {
      const found = await listPairs(at.mappingId, at.statePointId)
      if (question === asked) pairs.value = found
    } catch (failure) {
      if (question === asked) error.value = failure instanceof Error ? failure : new Error(String(failure))
    }
  }

  watch(
    () => {
      const at = place()
      return at === null ? null : `${at.mappingId} ${at.statePointId}`
    },
    () => {
      pairs.value = null
      void reload()
    },
    { immediate: true },
  )

  const chosen = computed(() => {
    const all = pairs.value ?? []
    const name = named()
    return (
      all.find((pair) => pairKey(pair) === name) ??
      all.find(({ jointDistributionId }) => jointDistributionId !== null) ??
      all[0] ??
      null
    )
  })

  return { pairs, error, chosen, reload }
}
