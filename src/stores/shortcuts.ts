import { computed, ref, shallowRef } from 'vue'
import { defineStore } from 'pinia'

/** A key of a room: what is pressed, what it is called in the foot line, and what it does. */
export interface Shortcut {
  /** Values of KeyboardEvent.key, such as 'j' or 'ArrowLeft'; letters in lower case. */
  readonly keys: readonly string[]
  /** What stands after the keys: 'term', 'reading', 'undo'. */
  readonly label: string
  /** Signs in the foot line; the keys themselves when left out. */
  readonly signs?: readonly string[]
  /** Only together with Ctrl or Command. */
  readonly withControl?: boolean
  /** Only together with Shift; asked of letters and named keys, not of signs such as '?'. */
  readonly withShift?: boolean
  /** Told in the foot line, not only in the list of all keys; default true. */
  readonly hint?: boolean
  readonly run: (event: KeyboardEvent) => void
}

/** The keys of the rooms on screen. The shell listens and the foot line tells. */
export const useShortcutsStore = defineStore('shortcuts', () => {
  const sources = shallowRef<readonly (() => readonly Shortcut[])[]>([])
  const listOpen = ref(false)

  const shortcuts = computed(() => sources.value.flatMap((source) => source()))
  const hints = computed(() => shortcuts.value.filter(({ hint }) => hint !== false))

  /** Adds keys; the answer takes them away again. */
  const register = (source: () => readonly Shortcut[]): (() => void) => {
    sources.value = [...sources.value, source]
    return () => {
      sources.value = sources.value.filter((each) => each !== source)
    }
  }

  return { shortcuts, hints, listOpen, register }
})
