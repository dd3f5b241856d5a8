import { computed, ref, shallowRef, watch, type ComputedRef, type Ref, type ShallowRef } from 'vue'
import type { Received } from '@shared/contracts/delivery'
import { receiving, type Receiving } from '@/api/deliveries'
import { ApiError } from '@/api/http'

/** A hand-over as its recipient sees it, and what they do with it. */
export interface ReceivedRoom {
  readonly api: ComputedRef<Receiving>
  readonly page: ShallowRef<Received | null>
  readonly failure: ShallowRef<ApiError | null>
  readonly busy: Ref<boolean>
  readonly load: () => Promise<void>
  /** Does something and shows what it led to; the refusal is given back. */
  readonly act: (step: (api: Receiving) => Promise<Received>) => Promise<ApiError | null>
}

/** @param base as in `receiving` */
export function useReceived(base: () => string): ReceivedRoom {
  const api = computed(() => receiving(base()))
  const page = shallowRef<Received | null>(null)
  const failure = shallowRef<ApiError | null>(null)
  const busy = ref(false)

  const load = async (): Promise<void> => {
    failure.value = null
    const asked = api.value
    try {
      const found = await asked.page()
      if (asked === api.value) page.value = found
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      failure.value = error
    }
  }
  const act: ReceivedRoom['act'] = async (step) => {
    busy.value = true
    try {
      page.value = await step(api.value)
      return null
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      return error
    } finally {
      busy.value = false
    }
  }
  watch(
    base,
    () => {
      page.value = null
      void load()
    },
    { immediate: true },
  )
  return { api, page, failure, busy, load, act }
}
