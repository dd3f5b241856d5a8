import { ref, shallowRef, watch, type Ref, type ShallowRef } from 'vue'
import type { Pair } from '@shared/contracts/distribution'
import { ApiError } from '@/api/http'
import { listPairs } from '@/api/joint-distributions'
import { useWorkbenchStore } from '@/stores/workbench'

/** The pairs of terms of the mapping on screen at its state point, and why they could not be fetched. */
export function usePairs(): {
  pairs: ShallowRef<readonly Pair[]>
  failure: Ref<string>
  load: () => Promise<void>
} {
  const workbench = useWorkbenchStore()
  const pairs = shallowRef<readonly Pair[]>([])
  const failure = ref('')
  let asked = 0

  const load = async (): Promise<void> => {
    const question = ++asked
    const [mappingId, statePointId] = [workbench.mapping?.id, workbench.statePoint?.id]
    failure.value = ''
    try {
      const found = mappingId && statePointId ? await listPairs(mappingId, statePointId) : []
      if (question === asked) pairs.value = found
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      if (question === asked) failure.value = error.message
    }
  }

  watch([() => workbench.mapping?.id, () => workbench.statePoint?.id], load, { immediate: true })

  return { pairs, failure, load }
}
