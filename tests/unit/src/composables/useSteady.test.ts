import { describe, expect, it } from 'vitest'
import { shallowRef } from 'vue'
import { useSteady } from '@/composables/useSteady'

describe('useSteady', () => {
  it('keeps its identity as long as it says the same', () => {
    const source = shallowRef([1, 2])
    const steady = useSteady(() => source.value)
    const first = steady.value
    source.value = [1, 2]
    expect(steady.value).toBe(first)
    source.value = [1, 3]
    expect(steady.value).toEqual([1, 3])
  })
})
