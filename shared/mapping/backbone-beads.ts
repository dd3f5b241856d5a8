import { backboneAtoms, type RepeatUnit } from '../chemistry'
import type { MappingDocument } from './mapping-document'

/**
 * The beads along the backbone: those that hold an atom of it.
 *
 * @returns bead ids
 */
export function backboneBeads(unit: RepeatUnit, document: MappingDocument): Set<string> {
  const backbone = new Set(backboneAtoms(unit))
  const along = document.beads.filter(({ atoms }) => atoms.some(({ atom }) => backbone.has(atom)))
  return new Set(along.map(({ id }) => id))
}
