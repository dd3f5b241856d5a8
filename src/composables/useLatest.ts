import { onScopeDispose, shallowRef, watch, type ShallowRef } from 'vue'

/** The newest answer, the question it belongs to, and the error of the newest question that failed. */
export interface Latest<Question, Answer> {
  readonly answer: Readonly<ShallowRef<Answer | null>>
  readonly answered: Readonly<ShallowRef<Question | null>>
  readonly error: Readonly<ShallowRef<Error | null>>
  readonly busy: Readonly<ShallowRef<boolean>>
}

/**
 * Asks again whenever the question changes, one question at a time: while one is under way only the newest is kept, so a
 * moving slider builds up no queue. Every answer is shown when it comes, also an older one while a newer is asked. A failed
 * question leaves the last answer standing beside its error; the question null clears all.
 */
export function useLatest<Question extends object, Answer>(
  question: () => Question | null,
  ask: (question: Question) => Promise<Answer>,
): Latest<Question, Answer> {
  const answer = shallowRef(null) as ShallowRef<Answer | null>
  const answered = shallowRef(null) as ShallowRef<Question | null>
  const error = shallowRef<Error | null>(null)
  const busy = shallowRef(false)
  let newest: Question | null = null
  let alive = true

  const work = async (): Promise<void> => {
    busy.value = true
    let asked: Question | null = null
    while (alive && newest !== null && newest !== asked) {
      asked = newest
      try {
        const found = await ask(asked)
        if (!alive || newest === null) break
        answer.value = found
        answered.value = asked
        error.value = null
      } catch (failure) {
        if (newest === asked) error.value = failure instanceof Error ? failure : new Error(String(failure))
      }
    }
    busy.value = false
  }

  watch(
    question,
    (next) => {
      newest = next
      if (next === null) {
        answer.value = null
        answered.value = null
        error.value = null
      } else if (!busy.value) void work()
    },
    { immediate: true },
  )
  onScopeDispose(() => {
    alive = false
  })

  return { answer, answered, error, busy }
}
