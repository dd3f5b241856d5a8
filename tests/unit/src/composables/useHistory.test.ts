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
})
