import { mount } from '@vue/test-utils'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { effectScope } from 'vue'
import { useShortcutListener } from '@/composables/useShortcutListener'
import { useShortcuts } from '@/composables/useShortcuts'
import { usePreferencesStore } from '@/stores/preferences'
import { useShortcutsStore } from '@/stores/shortcuts'
import { freshStores } from '../../../support/mount'

const term = vi.fn()
const undo = vi.fn()
const redo = vi.fn()
const keys = [
  { keys: ['j'], label: 'term', run: term },
  { keys: ['ArrowLeft'], label: 'reading', run: term },
  { keys: ['z'], label: 'undo', withControl: true, run: undo },
  { keys: ['z'], label: 'redo', withControl: true, withShift: true, hint: false, run: redo },
]
let scope = effectScope()

beforeEach(() => {
  freshStores()
  vi.clearAllMocks()
  scope = effectScope()
  scope.run(() => {
    useShortcutListener()
    useShortcuts(keys)
  })
})
afterEach(() => {
  scope.stop()
  document.body.innerHTML = ''
})

const press = (key: string, init: KeyboardEventInit = {}, target: EventTarget = document.body): boolean =>
  target.dispatchEvent(new KeyboardEvent('keydown', { key, bubbles: true, cancelable: true, ...init }))
const add = (html: string): HTMLElement => {
  document.body.innerHTML = html
  return document.body.firstElementChild as HTMLElement
}

describe('shortcuts', () => {
  it('act on the page, small or capital, and are taken from the browser', () => {
    expect(press('j')).toBe(false)
    press('J', { shiftKey: true })
    expect(term).toHaveBeenCalledOnce()
  })

  it('never act while someone types', () => {
    press('j', {}, add('<input type="text">'))
    press('j', {}, add('<textarea></textarea>'))
    expect(term).not.toHaveBeenCalled()
  })

  it('leave the arrows to what has arrows of its own', () => {
    press('ArrowLeft', {}, add('<div role="slider" tabindex="0"></div>'))
    expect(term).not.toHaveBeenCalled()
    press('ArrowLeft', {}, add('<button>x</button>'))
    expect(term).toHaveBeenCalledOnce()
  })

  it('tell Control and Shift apart', () => {
    press('z')
    press('z', { ctrlKey: true })
    press('Z', { metaKey: true, shiftKey: true })
    expect([undo.mock.calls.length, redo.mock.calls.length]).toEqual([1, 1])
  })

  it('can be switched off, all but those with Control', () => {
    usePreferencesStore().singleKeys = false
    press('j')
    press('?')
    press('z', { ctrlKey: true })
    expect(term).not.toHaveBeenCalled()
    expect(useShortcutsStore().listOpen).toBe(false)
    expect(undo).toHaveBeenCalledOnce()
  })

  it('stand still while a dialog is open', () => {
    add('<div class="v-overlay v-overlay--active v-dialog"></div>')
    press('j')
    expect(term).not.toHaveBeenCalled()
  })

  it('open their list with ?, and hint only at those meant for the foot line', () => {
    press('?', { shiftKey: true })
    const registry = useShortcutsStore()
    expect(registry.listOpen).toBe(true)
    expect(registry.hints.map(({ label }) => label)).toEqual(['term', 'reading', 'undo'])
  })

  it('go with the component that brought them', () => {
    const room = mount({
      setup: () => useShortcuts([{ keys: ['x'], label: 'more', run: term }]),
      template: '<p />',
    })
    expect(useShortcutsStore().shortcuts).toHaveLength(5)
    room.unmount()
    expect(useShortcutsStore().shortcuts).toHaveLength(4)
  })
})
