import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { shallowRef } from 'vue'
import { useFollowing } from '@/composables/useFollowing'

let moving = true
const open = () => {
  const source = shallowRef('a')
  const followers = useFollowing(source, 3, () => moving)
  return { source, seen: () => followers.map(({ value }) => value).join('') }
}

beforeEach(() => {
  vi.useFakeTimers({ toFake: ['requestAnimationFrame', 'cancelAnimationFrame'] })
  moving = true
})
afterEach(() => {
  vi.useRealTimers()
})

describe('useFollowing', () => {
  it('lets one follower catch up in each frame while a hand moves', () => {
    const { source, seen } = open()
    source.value = 'b'
    const steps = [seen()]
    for (let frame = 0; frame < 4; frame++) {
      vi.advanceTimersToNextFrame()
      steps.push(seen())
    }
    expect(steps).toEqual(['aaa', 'baa', 'bba', 'bbb', 'bbb'])
  })

  it('starves none of them when the value goes on changing', () => {
    const { source, seen } = open()
    for (const value of 'bcd') {
      source.value = value
      vi.advanceTimersToNextFrame()
    }
    expect(seen()).toBe('bcd')
  })

  it('lets all of them follow at once when no hand moves', () => {
    const { source, seen } = open()
    moving = false
    source.value = 'b'
    expect(seen()).toBe('bbb')
  })
})
