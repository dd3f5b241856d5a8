import { computed, onScopeDispose, type ComputedRef } from 'vue'
import {
  startInversionWorker,
  type InversionAnswer,
  type InversionTask,
  type InversionWorker,
} from '@/workers'
import { useLatest, type Latest } from './useLatest'

/** What the bench shows of an inversion. */
export interface InversionState {
  /** The newest answer that belongs to the histogram on screen. */
  readonly answer: ComputedRef<InversionAnswer | null>
  /** log10 λ of automatic smoothing, for the mark beside the slider. */
  readonly automatic: ComputedRef<number | null>
  readonly error: Latest<InversionTask, InversionAnswer>['error']
  readonly busy: Latest<InversionTask, InversionAnswer>['busy']
}

/**
 * Inverts in a worker whenever the task changes. Answers for another histogram are never shown; while a slider moves the
 * last answer stays until the next is there.
 */
export function useInversion(
  task: () => InversionTask | null,
  start: () => InversionWorker = startInversionWorker,
): InversionState {
  const worker = start()
  onScopeDispose(() => worker.stop())

  const current = computed(task)
  const inversion = useLatest(
    () => current.value,
    (question) => worker.runInversion(question),
  )
  const answer = computed(() =>
    inversion.answered.value?.histogram === current.value?.histogram ? inversion.answer.value : null,
  )

  const automaticTask = computed<InversionTask | null>((before) => {
    const next = current.value
    if (next === null || next.settings.smoothing.mode === 'auto') return null
    const same =
      before?.histogram === next.histogram &&
      before.temperature === next.temperature &&
      before.settings.jacobian === next.settings.jacobian
    return same ? before : next
  })
  const separately = useLatest(
    () => automaticTask.value,
    (question) => worker.findAutomatic(question),
  )
  const automatic = computed(() => {
    if (current.value?.settings.smoothing.mode !== 'auto') {
      return separately.answered.value === automaticTask.value ? separately.answer.value : null
    }
    return answer.value?.inversion.smoothing.log10Lambda ?? null
  })

  return { answer, automatic, error: inversion.error, busy: inversion.busy }
}
