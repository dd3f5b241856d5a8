import { computed, ref, shallowRef, watch, type ComputedRef, type Ref } from 'vue'
import { useRoute } from 'vue-router'
import type { Mapping } from '@shared/contracts/mapping'
import type { MappingVersion } from '@shared/contracts/mapping-version'
import { ApiError } from '@/api/http'
import { listVersions } from '@/api/mappings'

/** The earlier version of a mapping that the address asks for, as in ?version=1. */
export interface ShownVersion {
  /** The mapping as it was then; the mapping itself where no earlier version is asked for; null until it is known. */
  readonly shown: ComputedRef<Mapping | null>
  /** null for the mapping itself. */
  readonly version: ComputedRef<MappingVersion | null>
  readonly failure: Ref<string>
}

/** Follows the address. */
export function useShownVersion(mapping: () => Mapping | null): ShownVersion {
  const route = useRoute()
  const versions = shallowRef<readonly MappingVersion[] | null>(null)
  const failure = ref('')
  const asked = computed(() => {
    const number = Number(route.query['version'])
    const newest = mapping()?.version ?? 0
    return Number.isInteger(number) && number >= 1 && number < newest ? number : null
  })
  const version = computed(() => versions.value?.find(({ number }) => number === asked.value) ?? null)
  const shown = computed(() => {
    const current = mapping()
    if (current === null || asked.value === null) return current
    return version.value && { ...current, document: version.value.document }
  })

  watch(
    [asked, () => mapping()?.id],
    async ([number, id]) => {
      failure.value = ''
      if (number === null || id === undefined) return
      try {
        versions.value = await listVersions(id)
      } catch (error) {
        if (!(error instanceof ApiError)) throw error
        failure.value = error.message
      }
    },
    { immediate: true },
  )
  return { shown, version, failure }
}
