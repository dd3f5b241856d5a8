import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { effectScope, shallowRef } from 'vue'
import { useAfterPaint } from '@/composables/useAfterPaint'

describe('useAfterPaint', () => {
  beforeEach(() => {
    vi.useFakeTimers({
      toFake: ['requestAnimationFrame', 'cancelAnimationFrame', 'setTimeout', 'clearTimeout'],
    })
  })
  afterEach(() => {
    vi.useRealTimers()
  })

  const followed = (source: { value: number | null }) => {
    const scope = effectScope()
    return { scope, value: scope.run(() => useAfterPaint(() => source.value))! }
  }

  it('takes the first value and null at once', () => {
    const source = shallowRef<number | null>(null)
    const { value } = followed(source)
    source.value = 1
    expect(value.value).toBe(1)
    source.value = null
    expect(value.value).toBeNull()
  })

  it('takes the newest of several changes once their frame is over', () => {
    const source = shallowRef<number | null>(1)
    const { value } = followed(source)
    source.value = 2
    source.value = 3
    expect(value.value).toBe(1)
    vi.advanceTimersToNextFrame()
    expect(value.value).toBe(1)
    vi.runAllTimers()
    expect(value.value).toBe(3)
  })

  it('drops what waits when null comes, and when its scope ends', () => {
    const source = shallowRef<number | null>(1)
    const { scope, value } = followed(source)
    source.value = 2
    source.value = null
    vi.runAllTimers()
    expect(value.value).toBeNull()
    source.value = 4
    source.value = 5
    scope.stop()
    vi.runAllTimers()
    expect(value.value).toBe(4)
  })
})
