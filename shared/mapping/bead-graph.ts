import type { RepeatUnit } from '../chemistry'
import { InvalidInputError } from '../errors'
import { beadLinks } from './bead-links'
import type { MappingDocument } from './mapping-document'
import type { BeadPlace } from './term'

/** The beads of a short chain and the bonds between them, by index in `beads`. */
export interface BeadGraph {
  readonly beads: readonly BeadPlace[]
  readonly bonds: readonly { readonly from: number; readonly to: number }[]
}

/**
 * The bead graph of a chain of some units, ends cut off.
 *
 * @param units number of repeat units, a whole number from 1 on
 * @returns beads unit by unit in the order of the document; each bond once
 * @throws {InvalidInputError} MAPPING_INVALID for an atom that the unit does not have; SETTING_INVALID for `units`
 */
export function beadGraph(unit: RepeatUnit, document: MappingDocument, units: number): BeadGraph {
  if (!Number.isInteger(units) || units < 1) {
    throw new InvalidInputError('SETTING_INVALID', `A chain has a whole number of units, not ${units}.`)
  }
  const count = document.beads.length
  const beads = Array.from({ length: units }, (_, u) =>
    document.beads.map(({ id }) => ({ bead: id, unit: u })),
  )
  const bonds: { from: number; to: number }[] = []
  for (const { from, to, shift } of beadLinks(unit, document)) {
    if (shift < 0 || (shift === 0 && from > to)) continue
    for (let u = 0; u + shift < units; u++)
      bonds.push({ from: u * count + from, to: (u + shift) * count + to })
  }
  return { beads: beads.flat(), bonds }
}
