import type { Point, RepeatUnit } from '@shared/chemistry'
import type { Bead } from '@shared/mapping'

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
  const lines = bonds.map(({ from, to }) => `M${at(positions[from])}L${at(positions[to])}`)
  const dots = held.filter((atom) => !joined.has(atom)).map((atom) => `M${at(positions[atom])}l.01 0`)
  return [...lines, ...dots].join('')
}

/** Where the bead sits on the drawing: as its rule says, on the positions of the drawn atoms; null for an empty bead. */
export function sitePoint(unit: RepeatUnit, positions: readonly Point[], bead: Bead): Point | null {
  const { site } = bead
  if (site.rule === 'atom') return positions[site.atom] ?? null
  let [x, y, sum] = [0, 0, 0]
  for (const { atom, weight } of bead.atoms) {
    const share = site.rule === 'mass' ? weight * unit.atoms[atom].mass : weight
    x += share * positions[atom].x
    y += share * positions[atom].y
    sum += share
  }
  return sum > 0 ? { x: x / sum, y: y / sum } : null
}

function at({ x, y }: Point): string {
  return `${Number(x.toFixed(1))} ${Number(y.toFixed(1))}`
}
