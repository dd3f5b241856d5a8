import { atomLinks, type RepeatUnit } from '../chemistry'
import { InvalidInputError } from '../errors'
import type { MappingDocument } from './mapping-document'

/**
 * A bond between two beads of the chain, as seen from the first: bead `from` in any unit u is bonded to bead `to` in unit
 * u + shift. Indices refer to `MappingDocument.beads`.
 */
export interface BeadLink {
  readonly from: number
  readonly to: number
  readonly shift: number
  /** The atom bonds that make it, first atom in `from`; indices in the repeat unit. */
  readonly atomBonds: readonly { readonly from: number; readonly to: number; readonly label: string }[]
}

/**
 * Which beads of an endless chain are bonded: those with atoms that are bonded. An atom shared by two beads counts for both, so
 * whatever is bonded to it is bonded to both.
 *
 * @returns each bond twice, once from each end, in no particular order
 * @throws {InvalidInputError} MAPPING_INVALID when a bead names an atom that the unit does not have
 */
export function beadLinks(unit: RepeatUnit, document: MappingDocument): BeadLink[] {
  checkAtoms(unit, document)
  const holders: { bead: number; unit: number }[][] = unit.atoms.map(() => [])
  document.beads.forEach((bead, index) => {
    for (const { atom, unit: offset } of bead.atoms) {
      holders[atom].push({ bead: index, unit: offset })
    }
  })
  const links = new Map<
    string,
    { from: number; to: number; shift: number; atomBonds: BeadLink['atomBonds'][number][] }
  >()
  const add = (from: number, to: number, shift: number, bond: BeadLink['atomBonds'][number]): void => {
    const key = `${from} ${to} ${shift}`
    const link = links.get(key) ?? { from, to, shift, atomBonds: [] }
    link.atomBonds.push(bond)
    links.set(key, link)
  }
  for (const { from, to, shift, label } of atomLinks(unit)) {
    for (const first of holders[from]) {
      for (const second of holders[to]) {
        // A bead that holds atom a of its unit + k holds the atom a of unit 0 when it is in unit −k.
        const apart = shift - second.unit + first.unit
        if (first.bead === second.bead && apart === 0) continue
        add(first.bead, second.bead, apart, { from, to, label })
        add(second.bead, first.bead, -apart, { from: to, to: from, label })
      }
    }
  }
  return [...links.values()]
}

/**
 * Refuses a mapping that names atoms the unit does not have.
 *
 * @throws {InvalidInputError} MAPPING_INVALID
 */
export function checkAtoms(unit: RepeatUnit, document: MappingDocument): void {
  for (const { name, atoms } of document.beads) {
    const unknown = atoms.find(({ atom }) => atom >= unit.atoms.length)
    if (unknown === undefined) continue
    throw new InvalidInputError(
      'MAPPING_INVALID',
      `Bead ${name} names atom ${unknown.atom + 1}; the repeat unit has ${unit.atoms.length}.`,
      { field: 'document', index: unknown.atom },
    )
  }
}
