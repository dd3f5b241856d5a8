import type { RepeatUnit } from './repeat-unit'

/** A bond between two atoms of the chain; the second one is `shift` units further along. */
export interface AtomLink {
  readonly from: number
  readonly to: number
  readonly shift: number
  readonly label: string
}

/**
 * Bonds of one unit of the chain and to the next one: the tail of a unit is bonded to the head of the next.
 *
 * @returns each bond once
 */
export function atomLinks(unit: RepeatUnit): AtomLink[] {
  const inside = unit.bonds.map(({ from, to, order, aromatic }) => ({
    from,
    to,
    shift: 0,
    label: aromatic ? 'a' : String(order),
  }))
  const [head, tail] = unit.attachments
  return [...inside, { from: tail, to: head, shift: 1, label: String(unit.linkOrder) }]
}
