import { ref, shallowRef, watch, type Ref, type ShallowRef } from 'vue'
import type { Deliveries } from '@shared/contracts/delivery'
import { getDeliveries } from '@/api/deliveries'
import { ApiError } from '@/api/http'

/** What is between a released hand-over and its recipients, as the group sees it. */
export function useDeliveries(handOverId: () => string): {
  deliveries: ShallowRef<Deliveries | null>
  busy: Ref<boolean>
  refusal: ShallowRef<ApiError | null>
  load: () => Promise<void>
  act: (step: () => Promise<Deliveries>) => Promise<boolean>
} {
  const deliveries = shallowRef<Deliveries | null>(null)
  const busy = ref(false)
  const refusal = shallowRef<ApiError | null>(null)

  const act = async (step: () => Promise<Deliveries>): Promise<boolean> => {
    if (busy.value) return false
    busy.value = true
    refusal.value = null
    try {
      deliveries.value = await step()
      return true
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      refusal.value = error
      return false
    } finally {
      busy.value = false
    }
  }
  const load = async (): Promise<void> => {
    await act(() => getDeliveries(handOverId()))
  }
  watch(handOverId, load, { immediate: true })
  return { deliveries, busy, refusal, load, act }
}
