import { onUnmounted, shallowRef, watch, type Ref, type ShallowRef } from 'vue'
import type { RepeatUnit } from '@shared/chemistry'
import { ApiError } from '@/api/http'
import { useWorkbenchStore } from '@/stores/workbench'

/** The polymer room's data: the polymer with state points and mappings in the workbench store, and its repeat unit read. */
export function usePolymer(polymerId: Ref<string>): {
  unit: ShallowRef<RepeatUnit | null>
  failure: ShallowRef<ApiError | null>
  load: () => Promise<void>
} {
  const workbench = useWorkbenchStore()
  const unit = shallowRef<RepeatUnit | null>(null)
  const failure = shallowRef<ApiError | null>(null)
  let alive = true
  onUnmounted(() => {
    alive = false
  })

  const load = async (): Promise<void> => {
    failure.value = null
    try {
      await workbench.loadPolymer(polymerId.value)
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      failure.value = error
      return
    }
    const smiles = workbench.polymer?.smiles
    if (!alive || smiles === undefined || unit.value?.smiles === smiles) return
    const { parseRepeatUnit } = await import('@shared/chemistry')
    unit.value = await parseRepeatUnit(smiles)
  }

  watch(polymerId, load, { immediate: true })

  return { unit, failure, load }
}
