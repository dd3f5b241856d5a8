import { renameInDecisions } from './edit-decisions'
import { BEAD_COLOURS, type Bead, type MappingDocument } from './mapping-document'

/** What a person may change about a bead besides its atoms. */
export type BeadChange = Partial<Pick<Bead, 'name' | 'type' | 'label' | 'site' | 'endGroup'>>

/**
 * Gives atoms of the drawn unit to a bead, whole: they leave every other bead. The same document when nothing changes.
 *
 * @param beadId a bead of the document
 */
export function giveAtoms(
  document: MappingDocument,
  beadId: string,
  atoms: readonly number[],
): MappingDocument {
  return withBeads(document, (bead) => {
    const kept = bead.atoms.filter(({ atom }) => !atoms.includes(atom))
    if (bead.id !== beadId) return kept.length === bead.atoms.length ? bead : { ...bead, atoms: kept }
    const whole = atoms.every((atom) =>
      bead.atoms.some((held) => held.atom === atom && held.weight === 1 && held.unit === 0),
    )
    if (whole) return bead
    const given = atoms.map((atom) => ({ atom, weight: 1, unit: 0 }))
    return { ...bead, atoms: [...kept, ...given].sort((one, other) => one.atom - other.atom) }
  })
}

/** Takes atoms out of every bead. The same document when nothing changes. */
export function freeAtoms(document: MappingDocument, atoms: readonly number[]): MappingDocument {
  return withBeads(document, (bead) => {
    const kept = bead.atoms.filter(({ atom }) => !atoms.includes(atom))
    return kept.length === bead.atoms.length ? bead : { ...bead, atoms: kept }
  })
}

/**
 * Adds an empty bead with the next free letter as name and type and the least used colour.
 *
 * @param id new in the document
 */
export function addBead(document: MappingDocument, id: string): MappingDocument {
  const letters = 'ABCDEFGHIJKLMNOPQRSTUVWXYZ'.split('')
  const names = [...letters, ...letters.map((letter) => `${letter}2`)]
  const taken = new Set(document.beads.flatMap(({ name, type }) => [name, type]))
  const name = names.find((each) => !taken.has(each)) ?? names[document.beads.length % names.length]
  const uses = BEAD_COLOURS.map((_, colour) => document.beads.filter((bead) => bead.colour === colour).length)
  const colour = uses.indexOf(Math.min(...uses))
  const bead: Bead = { id, name, type: name, label: '', colour, site: { rule: 'mass' }, atoms: [] }
  return { ...document, beads: [...document.beads, bead] }
}

/**
 * Changes a bead's name, type, word, site rule or end note. What was decided about terms follows a type that gets a new name:
 * one that no other bead carries, before or after.
 */
export function changeBead(document: MappingDocument, beadId: string, change: BeadChange): MappingDocument {
  const changed = withBeads(document, (bead) => (bead.id === beadId ? { ...bead, ...change } : bead))
  const before = document.beads.find(({ id }) => id === beadId)?.type
  const after = change.type
  if (before === undefined || after === undefined || before === after) return changed
  const taken = document.beads.some(({ id, type }) => id !== beadId && (type === before || type === after))
  return taken ? changed : renameInDecisions(changed, before, after)
}

/** Removes a bead; its atoms are in no bead then, unless they were shared. */
export function removeBead(document: MappingDocument, beadId: string): MappingDocument {
  return { ...document, beads: document.beads.filter(({ id }) => id !== beadId) }
}

function withBeads(document: MappingDocument, change: (bead: Bead) => Bead): MappingDocument {
  const beads = document.beads.map(change)
  return beads.every((bead, index) => bead === document.beads[index]) ? document : { ...document, beads }
}
