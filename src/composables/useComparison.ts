import { computed, onUnmounted, shallowRef, watch, type ComputedRef, type Ref, type ShallowRef } from 'vue'
import type { LocationQuery } from 'vue-router'
import { COMPARED_MAPPINGS, type Comparison } from '@shared/contracts/comparison'
import type { Mapping } from '@shared/contracts/mapping'
import type { StatePoint } from '@shared/contracts/polymer'
import { compareMappings } from '@/api/comparison'
import { ApiError } from '@/api/http'
import { useWorkbenchStore } from '@/stores/workbench'
import { useLatest } from './useLatest'

/** What stands side by side, and how far it is. */
export interface ComparisonState {
  /** The mappings compared, in the order of the address; empty while there are fewer than two. */
  readonly chosen: ComputedRef<readonly Mapping[]>
  readonly statePoint: ComputedRef<StatePoint | null>
  /** The address names mappings that this polymer does not have. */
  readonly strangers: ComputedRef<boolean>
  /** null until it is there, and while it belongs to another question. */
  readonly comparison: ComputedRef<Comparison | null>
  /** Why the polymer could not be loaded. */
  readonly failure: ShallowRef<ApiError | null>
  /** Why the mappings could not be compared. */
  readonly error: Readonly<ShallowRef<Error | null>>
  readonly load: () => Promise<void>
}

/**
 * The comparison that an address asks for. Without two mappings of the polymer in it, the first six are taken; without a state
 * point the first one.
 *
 * @param query `mappings`, ids parted by commas, and `statePoint`
 */
export function useComparison(polymerId: Ref<string>, query: () => LocationQuery): ComparisonState {
  const workbench = useWorkbenchStore()
  const failure = shallowRef<ApiError | null>(null)
  /** The polymer in the store is the one asked for, loaded to the end. */
  const here = shallowRef(false)
  let alive = true
  onUnmounted(() => {
    alive = false
  })

  const load = async (): Promise<void> => {
    const id = polymerId.value
    failure.value = null
    here.value = false
    try {
      await workbench.loadPolymer(id)
      if (alive) here.value = workbench.polymer?.id === polymerId.value
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      if (id === polymerId.value) failure.value = error
    }
  }
  watch(polymerId, load, { immediate: true })

  const named = computed(() => [...new Set(String(query()['mappings'] ?? '').split(','))].filter(Boolean))
  const known = computed(() =>
    named.value.flatMap((id) => workbench.mappings.find((mapping) => mapping.id === id) ?? []),
  )
  const strangers = computed(() => here.value && known.value.length < named.value.length)
  const chosen = computed(() => {
    if (!here.value) return []
    const { least, most } = COMPARED_MAPPINGS
    const all = (known.value.length < least ? workbench.mappings : known.value).slice(0, most)
    return all.length < least ? [] : all
  })
  const statePoint = computed(() => {
    if (!here.value) return null
    const id = query()['statePoint']
    return workbench.statePoints.find((point) => point.id === id) ?? workbench.statePoints[0] ?? null
  })

  const key = computed(() =>
    statePoint.value === null || chosen.value.length === 0
      ? null
      : `${chosen.value.map(({ id }) => id).join(',')} ${statePoint.value.id}`,
  )
  const question = computed(() => (key.value === null ? null : { key: key.value }))
  const { answer, answered, error } = useLatest(
    () => question.value,
    () =>
      compareMappings(
        polymerId.value,
        chosen.value.map(({ id }) => id),
        statePoint.value?.id ?? '',
      ),
  )
  const comparison = computed(() => (answered.value?.key === key.value ? answer.value : null))

  return { chosen, statePoint, strangers, comparison, failure, error, load }
}
