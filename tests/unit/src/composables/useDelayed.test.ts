import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { effectScope, nextTick, ref } from 'vue'
import { useDelayed } from '@/composables/useDelayed'

beforeEach(() => vi.useFakeTimers())
afterEach(() => vi.useRealTimers())

describe('useDelayed', () => {
  it('is true only once the state has held for the whole while', async () => {
    const state = ref(true)
    const delayed = effectScope().run(() => useDelayed(() => state.value, 300))!
    vi.advanceTimersByTime(299)
    expect(delayed.value).toBe(false)
    vi.advanceTimersByTime(1)
    expect(delayed.value).toBe(true)
    state.value = false
    await nextTick()
    expect(delayed.value).toBe(false)
  })

  it('never becomes true for what is over before', async () => {
    const state = ref(true)
    const delayed = effectScope().run(() => useDelayed(() => state.value, 300))!
    vi.advanceTimersByTime(200)
    state.value = false
    await nextTick()
    vi.advanceTimersByTime(1000)
    expect(delayed.value).toBe(false)
  })
})
