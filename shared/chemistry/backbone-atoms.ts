import type { RepeatUnit } from './repeat-unit'
import { neighbourLists } from './smiles-graph'

/**
 * The atoms of the backbone: those on a way from one end of the unit to the other that meets no atom twice, rings of the
 * backbone with both of their sides. An atom is off the backbone exactly when one other atom parts it from both ends
 * (Menger).
 *
 * @returns atom indices, ascending
 * @example backboneAtoms(await parseRepeatUnit('*CC(*)C')) // [0, 1]
 */
export function backboneAtoms(unit: RepeatUnit): number[] {
  const neighbours = neighbourLists(unit.atoms.length, unit.bonds)
  const [head, tail] = unit.attachments
  if (head === tail) return [head]
  const off = new Set<number>()
  for (const { index: gate } of unit.atoms) {
    const reached = new Set([head, tail].filter((end) => end !== gate))
    for (const atom of reached) for (const next of neighbours[atom]) if (next !== gate) reached.add(next)
    for (const { index } of unit.atoms) if (index !== gate && !reached.has(index)) off.add(index)
  }
  return unit.atoms.map(({ index }) => index).filter((index) => !off.has(index))
}
