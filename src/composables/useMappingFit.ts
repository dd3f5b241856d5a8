import { ref, shallowRef, watch, type Ref, type ShallowRef } from 'vue'
import { useDebounceFn } from '@vueuse/core'
import type { MappingDocument } from '@shared/contracts/mapping'
import type { MappingFit } from '@shared/contracts/mapping-version'
import { ApiError } from '@/api/http'
import { previewFit } from '@/api/mappings'

/** Long enough for a stroke of painting to be one question. */
const PAUSE = 300

/**
 * Follows what saving the document on screen would do to the data of its mapping.
 *
 * @param document null while nothing waits to be saved as a version
 */
export function useMappingFit(
  mappingId: string,
  document: () => MappingDocument | null,
): { fit: ShallowRef<MappingFit | null>; failure: Ref<string> } {
  const fit = shallowRef<MappingFit | null>(null)
  const failure = ref('')
  let asked = 0

  const ask = useDebounceFn(async () => {
    const [question, wanted] = [++asked, document()]
    if (wanted === null) return
    failure.value = ''
    try {
      const found = await previewFit(mappingId, wanted)
      if (question === asked) fit.value = found
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      if (question === asked) failure.value = error.message
    }
  }, PAUSE)

  watch(
    document,
    (wanted) => {
      asked += 1
      fit.value = null
      if (wanted !== null) void ask()
    },
    { immediate: true },
  )
  return { fit, failure }
}
