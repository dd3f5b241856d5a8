import { atomTowards, type Direction } from './drawing/atom-towards'
import type { AtomTarget } from './drawing/atom-targets'

/** What keys on the drawing do. */
export interface CanvasKeys {
  readonly targets: readonly AtomTarget[]
  /** Index of the target with the focus. */
  readonly current: number
  readonly readonly: boolean
  readonly focus: (target: number) => void
  /** Moves what is seen, by shares of its width and height. */
  readonly pan: (right: number, down: number) => void
  /** Presses the target, with Shift or without. */
  readonly press: (target: number, modified: boolean) => void
  readonly free: (atom: number) => void
}

const PAN_STEP = 0.1
const PANS: Readonly<Record<Direction, readonly [number, number]>> = {
  ArrowLeft: [-PAN_STEP, 0],
  ArrowRight: [PAN_STEP, 0],
  ArrowUp: [0, -PAN_STEP],
  ArrowDown: [0, PAN_STEP],
}

/**
 * Acts on a key on the drawing: arrows go from atom to atom, with Shift they move the drawing; Space and Enter paint, Delete and 0
 * take the atom out of its beads.
 *
 * @returns whether the key was one of them
 */
export function pressCanvasKey(
  { key, shiftKey }: Pick<KeyboardEvent, 'key' | 'shiftKey'>,
  keys: CanvasKeys,
): boolean {
  if (key in PANS && shiftKey) keys.pan(...PANS[key as Direction])
  else if (key in PANS) {
    const points = keys.targets.map(({ point }) => point)
    keys.focus(atomTowards(points, keys.current, key as Direction))
  } else if (keys.readonly) return false
  else if (key === ' ' || key === 'Enter') keys.press(keys.current, shiftKey)
  else if (['Delete', 'Backspace', '0'].includes(key)) keys.free(keys.targets[keys.current].atom)
  else return false
  return true
}
