import type { Bead } from '@shared/mapping'
import type { Shortcut } from '@/stores/shortcuts'

/** What the keys of the mapping board do. */
export interface MappingKeys {
  readonly beads: readonly Bead[]
  readonly take: (beadId: string) => void
  readonly undo: () => void
  readonly redo: () => void
}

/** The canvas hears its own keys, on the atom that has the focus; here they are only told. */
const nothing = (): void => undefined

/** The keys of the mapping board. */
export function mappingShortcuts({ beads, take, undo, redo }: MappingKeys): Shortcut[] {
  const digits = beads.slice(0, 9).map((_, index) => String(index + 1))
  return [
    {
      keys: digits,
      label: 'take a bead',
      signs: digits.length > 1 ? ['1', String(digits.length)] : ['1'],
      hint: digits.length > 0,
      run: ({ key }) => take(beads[Number(key) - 1].id),
    },
    { keys: [], signs: ['←', '→'], label: 'next atom', run: nothing },
    { keys: [], signs: ['Space'], label: 'paint', run: nothing },
    { keys: ['z'], signs: ['Z'], label: 'undo', run: undo },
    { keys: ['z'], signs: ['Shift', 'Z'], label: 'redo', withShift: true, hint: false, run: redo },
    { keys: ['z'], signs: ['Ctrl', 'Z'], label: 'undo', withControl: true, hint: false, run: undo },
    { keys: ['y'], signs: ['Ctrl', 'Y'], label: 'redo', withControl: true, hint: false, run: redo },
  ]
}
