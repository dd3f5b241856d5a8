import { flushPromises } from '@vue/test-utils'
import { effectScope, shallowRef } from 'vue'
import { describe, expect, it } from 'vitest'
import { useLatest } from '@/composables/useLatest'

interface Question {
  readonly number: number
}

/** Answers come when the test says so. */
const oracle = () => {
  const asked: number[] = []
  const pending = new Map<number, { resolve: (answer: string) => void; reject: (error: Error) => void }>()
  const ask = ({ number }: Question): Promise<string> => {
    asked.push(number)
    return new Promise((resolve, reject) => pending.set(number, { resolve, reject }))
  }
  const answer = async (number: number): Promise<void> => {
    pending.get(number)!.resolve(`answer ${number}`)
    await flushPromises()
  }
  const refuse = async (number: number): Promise<void> => {
    pending.get(number)!.reject(new Error(`no ${number}`))
    await flushPromises()
  }
  return { asked, ask, answer, refuse }
}

const set = () => {
  const question = shallowRef<Question | null>({ number: 1 })
  const { ask, ...rest } = oracle()
  const scope = effectScope()
  const latest = scope.run(() => useLatest(() => question.value, ask))!
  const put = async (number: number | null): Promise<void> => {
    question.value = number === null ? null : { number }
    await flushPromises()
  }
  return { latest, put, scope, ...rest }
}

describe('useLatest', () => {
  it('asks one question at a time and of those that wait only the newest', async () => {
    const { latest, put, asked, answer } = set()
    for (const number of [2, 3, 4]) await put(number)
    expect(asked).toEqual([1])
    await answer(1)
    expect(latest.answer.value).toBe('answer 1')
    expect(asked).toEqual([1, 4])
    await answer(4)
    expect(latest.answer.value).toBe('answer 4')
    expect(latest.answered.value).toEqual({ number: 4 })
    expect(latest.busy.value).toBe(false)
  })

  it('keeps the last answer beside the error of a question that failed', async () => {
    const { latest, put, answer, refuse } = set()
    await answer(1)
    await put(2)
    await refuse(2)
    expect(latest.error.value?.message).toBe('no 2')
    expect(latest.answer.value).toBe('answer 1')
    await put(3)
    await answer(3)
    expect(latest.error.value).toBeNull()
  })

  it('passes over the failure of a question nobody asks any more', async () => {
    const { latest, put, answer, refuse } = set()
    await put(2)
    await refuse(1)
    expect(latest.error.value).toBeNull()
    await answer(2)
    expect(latest.answer.value).toBe('answer 2')
  })

  it('clears all for the question null, and a late answer brings nothing back', async () => {
    const { latest, put, answer } = set()
    await put(null)
    await answer(1)
    expect(latest.answer.value).toBeNull()
    await put(5)
    await answer(5)
    expect(latest.answer.value).toBe('answer 5')
  })

  it('asks nothing more once its scope is gone', async () => {
    const { put, asked, answer, scope } = set()
    await put(2)
    scope.stop()
    await answer(1)
    expect(asked).toEqual([1])
  })
})
