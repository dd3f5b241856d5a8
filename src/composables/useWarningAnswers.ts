import { shallowRef, watch, type ShallowRef } from 'vue'
import type { WarningAnswer } from '@shared/contracts/hand-over'
import type { StoredPotential } from '@shared/contracts/potential'
import { keepWarning, listAnswers } from '@/api/hand-overs'
import { ApiError } from '@/api/http'

/** Why warnings of a saved potential are kept. */
export interface WarningAnswers {
  readonly answers: ShallowRef<readonly WarningAnswer[]>
  readonly error: ShallowRef<string>
  readonly keep: (code: string, reason: string) => Promise<void>
}

/**
 * Answers to the warnings of a saved potential, fetched anew with each of its revisions: they hold for one input and one choice of
 * settings.
 */
export function useWarningAnswers(potential: () => StoredPotential | null): WarningAnswers {
  const answers = shallowRef<readonly WarningAnswer[]>([])
  const error = shallowRef('')
  const key = (): string => `${potential()?.id} ${potential()?.revision} ${potential()?.stale}`

  const ask = async (question: (id: string) => Promise<readonly WarningAnswer[]>): Promise<void> => {
    const id = potential()?.id
    const asked = key()
    error.value = ''
    if (id === undefined) return
    try {
      const found = await question(id)
      if (asked === key()) answers.value = found
    } catch (failure) {
      if (!(failure instanceof ApiError)) throw failure
      error.value = failure.message
    }
  }
  watch(
    key,
    () => {
      answers.value = []
      void ask(listAnswers)
    },
    { immediate: true },
  )
  return { answers, error, keep: (code, reason) => ask((id) => keepWarning(id, { code, reason })) }
}
