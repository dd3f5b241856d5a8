import type { Point, RepeatUnit } from '../chemistry'
import type { Bead, BeadAtom } from '../mapping'
import { atomPoint, type BoardLayout, positionsIn } from './board-layout'

/**
 * The path that a halo's stroke follows: the bonds between the atoms of a bead, and a dot for an atom that none of them
 * reaches.
 *
 * @param held atoms of the bead that are drawn
 */
export function haloPath(unit: RepeatUnit, positions: readonly Point[], held: readonly number[]): string {
  const inside = new Set(held)
  const bonds = unit.bonds.filter(({ from, to }) => inside.has(from) && inside.has(to))
  const joined = new Set(bonds.flatMap(({ from, to }) => [from, to]))
  const lines = bonds.map(({ from, to }) => `M${pointText(positions[from])}L${pointText(positions[to])}`)
  const dots = held.filter((atom) => !joined.has(atom)).map((atom) => `M${pointText(positions[atom])}l.01 0`)
  return [...lines, ...dots].join('')
}

/**
 * The path of a bead that may reach into neighbouring units: the path in each of them, and the bonds between units.
 *
 * @param atoms of the bead that are drawn
 * @param shift which unit the bead counts to, from the drawn one
 */
export function beadPath(
  unit: RepeatUnit,
  board: BoardLayout,
  atoms: readonly Pick<BeadAtom, 'atom' | 'unit'>[],
  shift = 0,
): string {
  const units = [...new Set(atoms.map((held) => held.unit))]
  const holds = (atom: number, at: number): boolean =>
    atoms.some((held) => held.atom === atom && held.unit === at)
  const [head, tail] = unit.attachments
  return units
    .map((at) => {
      const held = atoms.filter((each) => each.unit === at).map(({ atom }) => atom)
      const inside = haloPath(unit, positionsIn(board, at + shift), held)
      if (!holds(tail, at) || !holds(head, at + 1)) return inside
      const [from, to] = [atomPoint(board, tail, at + shift), atomPoint(board, head, at + 1 + shift)]
      return `${inside}M${pointText(from)}L${pointText(to)}`
    })
    .join('')
}

/** Where the bead sits on the drawing: as its rule says, on the positions of the drawn atoms; null for an empty bead. */
export function sitePoint(unit: RepeatUnit, board: BoardLayout, bead: Bead): Point | null {
  const { site } = bead
  if (site.rule === 'atom') {
    const held = bead.atoms.find(({ atom }) => atom === site.atom)
    return site.atom < board.positions.length ? atomPoint(board, site.atom, held?.unit ?? 0) : null
  }
  let [x, y, sum] = [0, 0, 0]
  for (const { atom, weight, unit: at } of bead.atoms) {
    const share = site.rule === 'mass' ? weight * unit.atoms[atom].mass : weight
    const point = atomPoint(board, atom, at)
    x += share * point.x
    y += share * point.y
    sum += share
  }
  return sum > 0 ? { x: x / sum, y: y / sum } : null
}

function pointText({ x, y }: Point): string {
  return `${Number(x.toFixed(1))} ${Number(y.toFixed(1))}`
}
