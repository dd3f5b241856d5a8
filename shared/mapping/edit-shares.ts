import type { Bead, BeadAtom, MappingDocument } from './mapping-document'

/** An atom as seen from a bead: which one, and how many units further along. */
export type AtomPlace = Pick<BeadAtom, 'atom' | 'unit'>

/**
 * Shares an atom equally between beads; every other bead loses it. A bead that held the atom keeps the unit it held it in.
 *
 * @param beadIds beads of the document, each once
 */
export function shareAtom(
  document: MappingDocument,
  atom: number,
  beadIds: readonly string[],
): MappingDocument {
  const weight = 1 / beadIds.length
  return withAtoms(document, (bead) => {
    const kept = bead.atoms.filter((held) => held.atom !== atom)
    if (!beadIds.includes(bead.id)) return kept.length === bead.atoms.length ? bead.atoms : kept
    const unit = bead.atoms.find((held) => held.atom === atom)?.unit ?? 0
    return sorted([...kept, { atom, weight, unit }])
  })
}

/**
 * Sets the share of an atom that a bead holds; the other shares stay as they are.
 *
 * @param weight in (0, 1]
 */
export function setShare(
  document: MappingDocument,
  beadId: string,
  { atom, unit }: AtomPlace,
  weight: number,
): MappingDocument {
  return withAtoms(document, (bead) =>
    bead.id !== beadId
      ? bead.atoms
      : bead.atoms.map((held) => (held.atom === atom && held.unit === unit ? { ...held, weight } : held)),
  )
}

/**
 * Gives an atom of this unit or a neighbouring one to a bead, whole: it leaves every other bead.
 *
 * @param place `unit` −1, 0 or 1
 */
export function giveAtomAcross(document: MappingDocument, beadId: string, place: AtomPlace): MappingDocument {
  return withAtoms(document, (bead) => {
    const kept = bead.atoms.filter(({ atom }) => atom !== place.atom)
    if (bead.id === beadId) return sorted([...kept, { ...place, weight: 1 }])
    return kept.length === bead.atoms.length ? bead.atoms : kept
  })
}

function sorted(atoms: readonly BeadAtom[]): BeadAtom[] {
  return atoms.toSorted((one, other) => one.unit - other.unit || one.atom - other.atom)
}

function withAtoms(document: MappingDocument, atomsOf: (bead: Bead) => BeadAtom[]): MappingDocument {
  const beads = document.beads.map((bead) => {
    const atoms = atomsOf(bead)
    return atoms === bead.atoms ? bead : { ...bead, atoms }
  })
  return { ...document, beads }
}
