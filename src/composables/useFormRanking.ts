import { watchDebounced } from '@vueuse/core'
import { computed, onScopeDispose, shallowRef, type ComputedRef } from 'vue'
import { startInversionWorker, type InversionTask, type InversionWorker, type RankingAnswer } from '@/workers'
import { useLatest } from './useLatest'

/** A ranking waits so long for the settings to come to rest. */
const REST_MILLISECONDS = 250

/** The ranking of the forms beside the inversion on screen. */
export interface FormRankingState {
  /** The newest ranking of the histogram on screen; its largest deviations follow the smoothing a moment later. */
  readonly ranking: ComputedRef<RankingAnswer | null>
  readonly error: ComputedRef<Error | null>
}

type Start = () => Pick<InversionWorker, 'runRanking' | 'stop'>

/**
 * Ranks all forms in a worker of its own once the settings rest, so that no slider waits for it. Only what the ranking
 * depends on asks again: not the form, the table or the depth of basins.
 */
export function useFormRanking(
  task: () => InversionTask | null,
  start: Start = startInversionWorker,
): FormRankingState {
  const worker = start()
  onScopeDispose(() => worker.stop())

  const current = computed<InversionTask | null>((before) => {
    const next = task()
    return before && next && sameQuestion(before, next) ? before : next
  })
  const rested = shallowRef<InversionTask | null>(null)
  watchDebounced(current, (task) => (rested.value = task), { debounce: REST_MILLISECONDS, immediate: true })
  const latest = useLatest(
    () => rested.value,
    (question) => worker.runRanking(question),
  )
  const ofThese = computed(() => latest.answered.value?.histogram === current.value?.histogram)

  return {
    ranking: computed(() => (ofThese.value ? latest.answer.value : null)),
    error: computed(() => latest.error.value),
  }
}

function sameQuestion(one: InversionTask, other: InversionTask): boolean {
  const rest = ({ temperature, settings }: InversionTask): string => {
    const { jacobian, smoothing, inefficiency, straightAngle, tails } = settings
    return JSON.stringify([temperature, jacobian, smoothing, inefficiency, straightAngle, tails])
  }
  return one.histogram === other.histogram && rest(one) === rest(other)
}
