import { shallowRef } from 'vue'
import { defineStore } from 'pinia'

/** A line that says what was done, with the way back where there is one. */
export interface Notice {
  readonly text: string
  readonly undo?: () => void
}

/** The ink bar at the bottom left: one notice at a time, the latest. */
export const useNoticesStore = defineStore('notices', () => {
  const current = shallowRef<Notice | null>(null)

  const say = (text: string, undo?: () => void): void => {
    current.value = undo ? { text, undo } : { text }
  }
  const dismiss = (): void => {
    current.value = null
  }

  return { current, say, dismiss }
})
