import { computed, shallowRef, watch, type ComputedRef } from 'vue'
import type { TermEvidence as EvidenceBody } from '@shared/contracts/term-evidence'
import { type MappingDocument, sameMakeUp, type TermEvidence } from '@shared/mapping'
import { ApiError } from '@/api/http'
import { getEvidence } from '@/api/mappings'
import { useWorkbenchStore } from '@/stores/workbench'

/**
 * What the data of the mapping on screen say at its state point about which terms to use; undefined while there are none, or
 * they cannot be fetched, or the beads on screen are not those they were measured on: the rule of preference decides then.
 *
 * @param document as it is painted
 */
export function useTermEvidence(document: () => MappingDocument): ComputedRef<TermEvidence | undefined> {
  const workbench = useWorkbenchStore()
  const found = shallowRef<EvidenceBody | null>(null)
  let asked = 0

  watch(
    [() => workbench.mapping?.id, () => workbench.statePoint?.id, () => workbench.mapping?.version],
    async ([mappingId, statePointId]) => {
      const question = ++asked
      found.value = null
      if (mappingId === undefined || statePointId === undefined || !workbench.mapping?.hasData) return
      try {
        const evidence = await getEvidence(mappingId, statePointId)
        if (question === asked) found.value = evidence
      } catch (error) {
        if (!(error instanceof ApiError)) throw error
      }
    },
    { immediate: true },
  )
  return computed(() => {
    const { samples = [], couplings = [] } = found.value ?? {}
    const saved = workbench.mapping?.document
    if (samples.length === 0 && couplings.length === 0) return undefined
    if (saved === undefined || !sameMakeUp(saved, document())) return undefined
    return { samples: new Map(samples.map(({ name, samples: count }) => [name, count])), couplings }
  })
}
