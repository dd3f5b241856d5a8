import { onScopeDispose, shallowRef, watch, type ShallowRef } from 'vue'
import type { JointDistribution } from '@shared/contracts/distribution'
import type { Correlation, VerdictThresholds } from '@shared/correlation'
import type { JointHistogram } from '@shared/histogram'
import { getJointDistribution } from '@/api/joint-distributions'
import { startCorrelationWorker, type CorrelationWorker } from '@/workers/correlation'

/** A stored joint distribution and what it says; both belong to the same file. */
export interface CorrelationState {
  readonly joint: Readonly<ShallowRef<JointDistribution | null>>
  readonly correlation: Readonly<ShallowRef<Correlation | null>>
  readonly error: Readonly<ShallowRef<Error | null>>
  /** Takes over the joint distribution as it was just saved, with the same numbers. */
  readonly replace: (saved: JointDistribution) => void
  readonly retry: () => Promise<void>
}

/**
 * Loads a joint distribution and has it worked out in a worker whenever its id changes. What is on screen goes at once when
 * another one is asked, so that a title never stands over another pair's map.
 */
export function useCorrelation(
  id: () => string | null,
  thresholds: () => VerdictThresholds,
  start: () => CorrelationWorker = startCorrelationWorker,
): CorrelationState {
  const joint = shallowRef<JointDistribution | null>(null)
  const correlation = shallowRef<Correlation | null>(null)
  const error = shallowRef<Error | null>(null)
  const worker = start()
  let asked = 0
  onScopeDispose(() => {
    asked += 1
    worker.stop()
  })

  const retry = async (): Promise<void> => {
    const question = ++asked
    const wanted = id()
    joint.value = null
    correlation.value = null
    error.value = null
    if (wanted === null) return
    try {
      const loaded = await getJointDistribution(wanted)
      if (question !== asked) return
      const found = await worker.runCorrelation(histogramOf(loaded), thresholds())
      if (question !== asked) return
      joint.value = loaded
      correlation.value = found
    } catch (failure) {
      if (question === asked) error.value = failure instanceof Error ? failure : new Error(String(failure))
    }
  }
  watch(id, retry, { immediate: true })

  const replace = (saved: JointDistribution): void => {
    if (saved.id === joint.value?.id) joint.value = saved
  }

  return { joint, correlation, error, replace, retry }
}

function histogramOf(stored: JointDistribution): JointHistogram {
  return {
    kinds: stored.kinds,
    xEdges: Float64Array.from(stored.xEdges),
    yEdges: Float64Array.from(stored.yEdges),
    weights: Float64Array.from(stored.weights),
    content: stored.content,
    independentSamples: stored.independentSamples,
  }
}
