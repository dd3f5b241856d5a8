import { describe, expect, it } from 'vitest'
import { useHistory } from '@/composables/useHistory'

describe('useHistory', () => {
  it('takes steps back and does them again', () => {
    const history = useHistory('a')
    history.push('b')
    history.push('c')
    history.undo()
    expect(history.value.value).toBe('b')
    expect([history.canUndo.value, history.canRedo.value]).toEqual([true, true])
    history.redo()
    expect(history.value.value).toBe('c')
    history.redo()
    expect(history.value.value).toBe('c')
  })

  it('forgets what was undone once something new is done', () => {
    const history = useHistory('a')
    history.push('b')
    history.undo()
    history.push('c')
    expect(history.canRedo.value).toBe(false)
    history.undo()
    expect(history.value.value).toBe('a')
  })

  it('makes no step of the same value', () => {
    const history = useHistory('a')
    history.push('a')
    expect(history.canUndo.value).toBe(false)
  })

  it('has no limit: ten thousand steps go back to the first and on to the last', () => {
    const history = useHistory(0)
    for (let step = 1; step <= 10_000; step++) history.push(step)
    const seen: number[] = []
    while (history.canUndo.value) {
      history.undo()
      seen.push(history.value.value)
    }
    expect(seen).toEqual(Array.from({ length: 10_000 }, (_, step) => 9999 - step))
    while (history.canRedo.value) history.redo()
    expect(history.value.value).toBe(10_000)
  })
})
