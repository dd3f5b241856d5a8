import { ref, shallowRef, type Ref, type ShallowRef } from 'vue'
import { ApiError } from '@/api/http'

/**
 * What a page fetches, and may fetch again: the answer to the newest question stands, whatever order answers come in; one that
 * fails leaves the answer of before beside the sentence of what failed.
 */
export function useFetched<Answer>(ask: () => Promise<Answer>): {
  answer: ShallowRef<Answer | null>
  failure: Ref<string>
  load: () => Promise<void>
} {
  const answer = shallowRef(null) as ShallowRef<Answer | null>
  const failure = ref('')
  let asked = 0

  const load = async (): Promise<void> => {
    const mine = ++asked
    failure.value = ''
    try {
      const found = await ask()
      if (mine === asked) answer.value = found
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      if (mine === asked) failure.value = error.message
    }
  }

  return { answer, failure, load }
}
