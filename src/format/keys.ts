import type { Shortcut } from '@/stores/shortcuts'

const SIGNS: Readonly<Record<string, string>> = {
  ArrowLeft: '←',
  ArrowRight: '→',
  ArrowUp: '↑',
  ArrowDown: '↓',
  ' ': 'Space',
  Escape: 'Esc',
  Delete: 'Del',
}

/** How the keys of a shortcut are printed: one sign per key cap. */
export const keySigns = (shortcut: Shortcut): readonly string[] => {
  if (shortcut.signs) return shortcut.signs
  const signs = shortcut.keys.map((key) => SIGNS[key] ?? (key.length === 1 ? key.toUpperCase() : key))
  return [...(shortcut.withControl ? ['Ctrl'] : []), ...(shortcut.withShift ? ['Shift'] : []), ...signs]
}
