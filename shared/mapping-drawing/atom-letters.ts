import type { Point, RepeatUnit } from '../chemistry'

/** A letter of the drawing with its charge; its place is that of the atom. */
export interface AtomLetter extends Point {
  readonly index: number
  readonly element: string
  /** As in 2+ or −; empty for none. */
  readonly charge: string
}

/** Whether an atom shows its letter: all but uncharged carbon. */
export function isLettered({ atoms }: RepeatUnit, atom: number): boolean {
  return atoms[atom].element !== 'C' || atoms[atom].charge !== 0
}

/** The letters of the atoms that are shown. */
export function atomLetters(
  unit: RepeatUnit,
  positions: readonly Point[],
  isShown: (atom: number) => boolean,
): AtomLetter[] {
  return unit.atoms
    .filter(({ index }) => isShown(index) && isLettered(unit, index))
    .map(({ index, element, charge }) => ({
      index,
      element,
      charge: chargeText(charge),
      ...positions[index],
    }))
}

function chargeText(value: number): string {
  if (value === 0) return ''
  return `${Math.abs(value) > 1 ? Math.abs(value) : ''}${value > 0 ? '+' : '−'}`
}
