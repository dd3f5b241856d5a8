import { computed, type ComputedRef } from 'vue'
import { usePreferencesStore } from '@/stores/preferences'

/**
 * Values of the colour tokens in the theme on screen, for what cannot read CSS variables (canvas, a drawing library).
 * Recomputed when the theme changes. Names are those of tokens.css without the dashes: `model`, `seq-3`, `b-blue`.
 */
export function useTokens<Name extends string>(
  names: readonly Name[],
): ComputedRef<Readonly<Record<Name, string>>> {
  const preferences = usePreferencesStore()
  return computed(() => {
    const theme = preferences.theme
    const probe = document.createElement('span')
    probe.dataset['theme'] = theme
    document.body.append(probe)
    const style = getComputedStyle(probe)
    const values = Object.fromEntries(names.map((name) => [name, style.getPropertyValue(`--${name}`).trim()]))
    probe.remove()
    return values as Record<Name, string>
  })
}
