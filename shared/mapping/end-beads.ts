import { composition, compositionMass, type Composition, type RepeatUnit } from '../chemistry'
import type { BeadAtom, MappingDocument } from './mapping-document'

/** A bead as it stands at an end of a chain that hydrogens close. */
export interface EndBead {
  readonly end: 'head' | 'tail'
  readonly bead: string
  /** What the bead holds there: its atoms inside the chain, and the hydrogens in place of the next unit. */
  readonly composition: Composition
  /** g/mol */
  readonly mass: number
  /** Atoms of the bead that would lie beyond the end: with them missing it is another bead than inside the chain. */
  readonly missing: readonly number[]
  /** The user's note. */
  readonly note: string
}

/**
 * The beads that end a chain: those that hold its first or last atom, and those that reach over its end. The ends are taken
 * as closed by hydrogen, one for each order of the bond between units; other end groups are for the note.
 *
 * @param document a mapping whose atoms all exist
 * @returns head first, in the order of the beads
 */
export function endBeads(unit: RepeatUnit, document: MappingDocument): EndBead[] {
  const ends = [
    { end: 'head', atom: unit.attachments[0], direction: 1 },
    { end: 'tail', atom: unit.attachments[1], direction: -1 },
  ] as const
  return ends.flatMap(({ end, atom, direction }) =>
    document.beads.flatMap((bead) =>
      // A bead that counts to a unit before the first can still reach into the chain.
      [-1, 0, 1].flatMap((at): EndBead[] => {
        const depth = (held: BeadAtom): number => direction * (at + held.unit)
        const inside = bead.atoms.filter((held) => depth(held) >= 0)
        const missing = bead.atoms.filter((held) => depth(held) < 0).map((held) => held.atom)
        const last = inside.filter((held) => held.atom === atom && depth(held) === 0)
        if (inside.length === 0 || (last.length === 0 && missing.length === 0)) return []
        const caps = last.reduce((sum, { weight }) => sum + weight * unit.linkOrder, 0)
        const counts = capped(unit, inside, caps)
        const mass = compositionMass(counts)
        return [{ end, bead: bead.id, composition: counts, mass, missing, note: bead.endGroup ?? '' }]
      }),
    ),
  )
}

function capped(unit: RepeatUnit, held: readonly BeadAtom[], hydrogens: number): Composition {
  const atoms = held.map(({ atom }) => unit.atoms[atom])
  const weights = held.map(({ weight }) => weight)
  const counts = composition(atoms, weights)
  return hydrogens > 0 ? { ...counts, H: (counts['H'] ?? 0) + hydrogens } : counts
}
