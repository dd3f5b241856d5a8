import { ref, shallowRef, watch, type Ref, type ShallowRef } from 'vue'
import type { MappingCoverage } from '@shared/contracts/mapping-coverage'
import type { MappingVersion } from '@shared/contracts/mapping-version'
import { ApiError } from '@/api/http'
import { getCoverage, listVersions } from '@/api/mappings'
import { useWorkbenchStore } from '@/stores/workbench'

/** The coverage and the earlier versions of the mapping on screen, again after each save. */
export function useCoverage(): {
  coverage: ShallowRef<MappingCoverage | null>
  versions: ShallowRef<readonly MappingVersion[]>
  failure: Ref<string>
} {
  const workbench = useWorkbenchStore()
  const coverage = shallowRef<MappingCoverage | null>(null)
  const versions = shallowRef<readonly MappingVersion[]>([])
  const failure = ref('')
  let asked = 0

  const load = async (): Promise<void> => {
    const question = ++asked
    const mapping = workbench.mapping
    failure.value = ''
    if (mapping === null) return
    try {
      const earlier = mapping.version > 1 ? listVersions(mapping.id) : []
      const [found, kept] = await Promise.all([getCoverage(mapping.id), earlier])
      if (question !== asked) return
      coverage.value = found
      versions.value = kept
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      if (question === asked) failure.value = error.message
    }
  }
  watch([() => workbench.mapping?.id, () => workbench.mapping?.revision], load, { immediate: true })
  return { coverage, versions, failure }
}
