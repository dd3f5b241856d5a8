import type { Bead } from '@shared/mapping'
import type { Shortcut } from '@/stores/shortcuts'

/** What the keys of the mapping board do. */
export interface MappingKeys {
  readonly beads: readonly Bead[]
  /** Id of the bead in hand. */
  readonly selected: string | null
  readonly take: (beadId: string) => void
  readonly undo: () => void
  readonly redo: () => void
}

/** What the keys of the drawing do; they act for those who only look, too. */
export interface ViewKeys {
  readonly nearer: () => void
  readonly further: () => void
  readonly fit: () => void
}

/** The canvas hears its own keys, on the atom that has the focus; here they are only told. */
const nothing = (): void => undefined

/** The first letters of the beads that are keys; Z undoes, whatever a bead is called. */
function letterKeys(beads: readonly Bead[]): string[] {
  const letters = beads.map(({ name }) => name[0].toLowerCase())
  return [...new Set(letters)].filter((letter) => /^[a-y]$/.test(letter))
}

/** The next bead whose name begins with a letter, after the one in hand. */
function beadOfLetter(beads: readonly Bead[], selected: string | null, letter: string): Bead {
  const named = beads.filter(({ name }) => name[0].toLowerCase() === letter)
  const place = named.findIndex(({ id }) => id === selected)
  return named[(place + 1) % named.length]
}

/** The keys of the mapping board. */
export function mappingShortcuts({ beads, selected, take, undo, redo }: MappingKeys): Shortcut[] {
  const digits = beads.slice(0, 9).map((_, index) => String(index + 1))
  const letters = letterKeys(beads)
  return [
    {
      keys: digits,
      label: 'take a bead',
      signs: digits.length > 1 ? ['1', String(digits.length)] : ['1'],
      hint: digits.length > 0,
      run: ({ key }) => take(beads[Number(key) - 1].id),
    },
    {
      keys: letters,
      label: 'take a bead by its letter, again for the next one',
      signs: letters.map((letter) => letter.toUpperCase()),
      hint: false,
      run: ({ key }) => take(beadOfLetter(beads, selected, key.toLowerCase()).id),
    },
    { keys: [], signs: ['←', '→'], label: 'next atom', run: nothing },
    { keys: [], signs: ['Space'], label: 'paint', run: nothing },
    { keys: [], signs: ['Shift', 'Space'], label: 'share the atom', hint: false, run: nothing },
    { keys: [], signs: ['Delete'], label: 'take the atom out of its beads', hint: false, run: nothing },
    { keys: ['z'], signs: ['Z'], label: 'undo', run: undo },
    { keys: ['z'], signs: ['Shift', 'Z'], label: 'redo', withShift: true, hint: false, run: redo },
    { keys: ['z'], signs: ['Ctrl', 'Z'], label: 'undo', withControl: true, hint: false, run: undo },
    { keys: ['y'], signs: ['Ctrl', 'Y'], label: 'redo', withControl: true, hint: false, run: redo },
  ]
}

/** The keys of the drawing. */
export function viewShortcuts({ nearer, further, fit }: ViewKeys): Shortcut[] {
  return [
    { keys: ['+', '='], signs: ['+', '-'], label: 'zoom', hint: false, run: nearer },
    { keys: ['-'], label: 'zoom out', hint: false, run: further },
    { keys: ['.'], label: 'fit the drawing', hint: false, run: fit },
    { keys: [], signs: ['Shift', '←', '→'], label: 'move the drawing', hint: false, run: nothing },
  ]
}
