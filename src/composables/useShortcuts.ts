import { onScopeDispose, toValue, type MaybeRefOrGetter } from 'vue'
import { useShortcutsStore, type Shortcut } from '@/stores/shortcuts'

/**
 * The keys of a room, for as long as its component lives: they act, stand in the foot line and in the list of all keys.
 * Keys without Ctrl or Command can be switched off by the user. They never act while someone types.
 */
export function useShortcuts(shortcuts: MaybeRefOrGetter<readonly Shortcut[]>): void {
  onScopeDispose(useShortcutsStore().register(() => toValue(shortcuts)))
}
