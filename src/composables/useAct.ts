import { ref, type Ref } from 'vue'
import { ApiError } from '@/api/http'

/** Does one thing at a time and keeps the sentence of what failed, for buttons that send at once. */
export function useAct(): {
  busy: Ref<boolean>
  failure: Ref<string>
  act: (work: () => Promise<unknown>) => Promise<boolean>
} {
  const busy = ref(false)
  const failure = ref('')

  const act = async (work: () => Promise<unknown>): Promise<boolean> => {
    if (busy.value) return false
    busy.value = true
    failure.value = ''
    try {
      await work()
      return true
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      failure.value = error.message
      return false
    } finally {
      busy.value = false
    }
  }

  return { busy, failure, act }
}
