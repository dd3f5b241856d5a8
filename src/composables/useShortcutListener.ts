import { useEventListener } from '@vueuse/core'
import { usePreferencesStore } from '@/stores/preferences'
import { useShortcutsStore, type Shortcut } from '@/stores/shortcuts'

const isTyping = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement &&
  (target.isContentEditable || ['INPUT', 'TEXTAREA', 'SELECT'].includes(target.tagName)) &&
  !['checkbox', 'radio', 'button', 'range'].includes((target as HTMLInputElement).type)

/** A slider, list or menu that has the focus needs its own arrows. */
const ownsArrows = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement &&
  target.closest('[role=slider], [role=listbox], [role=menu], [role=radiogroup], [role=combobox], input') !==
    null

const matches = (shortcut: Shortcut, event: KeyboardEvent): boolean => {
  const key = event.key.length === 1 ? event.key.toLowerCase() : event.key
  const control = event.ctrlKey || event.metaKey
  const isSign = key.length === 1 && key.toLowerCase() === key.toUpperCase()
  const shift = isSign || event.shiftKey === (shortcut.withShift ?? false)
  return shortcut.keys.includes(key) && control === (shortcut.withControl ?? false) && shift
}

/** Listens for the keys of all rooms; called once, by the shell. */
export function useShortcutListener(): void {
  const registry = useShortcutsStore()
  const preferences = usePreferencesStore()

  useEventListener(window, 'keydown', (event: KeyboardEvent) => {
    if (event.defaultPrevented || event.altKey || isTyping(event.target)) return
    if (document.querySelector('.v-overlay--active.v-dialog, .v-overlay--active.v-menu')) return
    if (event.key.startsWith('Arrow') && ownsArrows(event.target)) return
    const control = event.ctrlKey || event.metaKey
    if (!control && !preferences.singleKeys) return
    if (event.key === '?') {
      registry.listOpen = true
      event.preventDefault()
      return
    }
    const shortcut = registry.shortcuts.find((each) => matches(each, event))
    if (!shortcut) return
    event.preventDefault()
    shortcut.run(event)
  })
}
