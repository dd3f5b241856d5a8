import { ref, shallowRef, watch, type Ref, type ShallowRef } from 'vue'
import type { Distribution, JointDistribution } from '@shared/contracts/distribution'
import { ApiError } from '@/api/http'
import { findDistribution } from '@/api/distributions'
import { getJointDistribution, listPairs } from '@/api/joint-distributions'
import { targetKey, type IntakeTarget } from '@/components/intake/guess-target'

/** What is stored for a target at a state point. */
export type StoredData =
  | { readonly type: 'term'; readonly distribution: Distribution }
  | { readonly type: 'pair'; readonly distribution: JointDistribution }

/** Follows what is stored for a term or a pair at a state point; null while nothing is, or nobody asks. */
export function useStoredData(
  mappingId: () => string | undefined,
  target: () => IntakeTarget | null,
  statePointId: () => string | undefined,
): {
  stored: ShallowRef<StoredData | null>
  asking: Ref<boolean>
  failure: Ref<string>
  load: () => Promise<void>
} {
  const stored = shallowRef<StoredData | null>(null)
  const asking = ref(false)
  const failure = ref('')
  let asked = 0

  const find = async (): Promise<StoredData | null> => {
    const [wanted, mapping, statePoint] = [target(), mappingId(), statePointId()]
    if (wanted === null || mapping === undefined || !statePoint) return null
    if (wanted.type === 'term') {
      const distribution = await findDistribution(wanted.termId, statePoint)
      return distribution && { type: 'term', distribution }
    }
    const pairs = await listPairs(mapping, statePoint)
    const pair = pairs.find((each) => targetKey({ type: 'pair', ...each }) === targetKey(wanted))
    if (!pair?.jointDistributionId) return null
    return { type: 'pair', distribution: await getJointDistribution(pair.jointDistributionId) }
  }

  const load = async (): Promise<void> => {
    const question = ++asked
    asking.value = true
    failure.value = ''
    try {
      const found = await find()
      if (question === asked) stored.value = found
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      if (question !== asked) return
      stored.value = null
      failure.value = error.message
    } finally {
      if (question === asked) asking.value = false
    }
  }

  const wanted = (): string => {
    const aim = target()
    return [mappingId(), aim && targetKey(aim), statePointId()].join()
  }
  watch(
    wanted,
    () => {
      stored.value = null
      void load()
    },
    { immediate: true },
  )

  return { stored, asking, failure, load }
}
