import { computed } from 'vue'
import { useLocalStorage, usePreferredDark } from '@vueuse/core'
import { defineStore } from 'pinia'

export type ThemeChoice = 'light' | 'dark' | 'system'

/** What a person likes on this device, kept in the browser: the theme, and whether single keys act. */
export const usePreferencesStore = defineStore('preferences', () => {
  const themeChoice = useLocalStorage<ThemeChoice>('beadwright.theme', 'system')
  const singleKeys = useLocalStorage<boolean>('beadwright.single-keys', true)
  const prefersDark = usePreferredDark()

  const theme = computed<'light' | 'dark'>(() => {
    if (themeChoice.value === 'light' || themeChoice.value === 'dark') return themeChoice.value
    return prefersDark.value ? 'dark' : 'light'
  })

  return { themeChoice, singleKeys, theme }
})
