import type { RepeatUnit } from '@shared/chemistry'
import type { Bead, BeadChange, MappingDocument, MappingProblem } from '@shared/mapping'

/** What would be done about a problem. */
export type RemedyAct =
  | { readonly kind: 'give'; readonly atoms: readonly number[]; readonly bead: string }
  | { readonly kind: 'select'; readonly bead: string }
  | { readonly kind: 'change'; readonly bead: string; readonly change: BeadChange }
  | { readonly kind: 'remove'; readonly bead: string }

/** One way to mend a problem: what its link says, and what it does. */
export interface Remedy {
  readonly label: string
  readonly act: RemedyAct
}

/** More than these would be a list to read, not a choice. */
const MOST_OFFERED = 3

/** The ways to mend a problem that one step can go; none for a note. */
export function remedies(problem: MappingProblem, unit: RepeatUnit, document: MappingDocument): Remedy[] {
  const beads = document.beads.filter(({ id }) => problem.beads.includes(id))
  return found(problem, beads, unit, document).slice(0, MOST_OFFERED)
}

function found(
  problem: MappingProblem,
  beads: readonly Bead[],
  unit: RepeatUnit,
  document: MappingDocument,
): Remedy[] {
  const { atoms } = problem
  switch (problem.code) {
    case 'ATOM_IN_NO_BEAD':
      return bondedBeads(atoms, unit, document).map(({ id, name }) => ({
        label: `Give ${atoms.length > 1 ? 'them' : 'it'} to ${name}`,
        act: { kind: 'give', atoms, bead: id },
      }))
    case 'ATOM_SHARES':
      return beads.map(({ id, name }) => ({
        label: `Give ${unit.atoms[atoms[0]].label} whole to ${name}`,
        act: { kind: 'give', atoms, bead: id },
      }))
    case 'BEAD_EMPTY':
      return beads.flatMap(({ id, name }) => [
        { label: `Paint with ${name}`, act: { kind: 'select', bead: id } },
        { label: `Remove ${name}`, act: { kind: 'remove', bead: id } },
      ])
    case 'BEAD_IN_PIECES':
      return beads.map(({ id, name }) => ({ label: `Paint with ${name}`, act: { kind: 'select', bead: id } }))
    case 'SITE_OUTSIDE':
      return beads.map(({ id, name }) => ({
        label: `Put ${name} at its centre of mass`,
        act: { kind: 'change', bead: id, change: { site: { rule: 'mass' } } },
      }))
    case 'BEAD_NAME_TWICE':
      return beads.slice(1).map(({ id, type }, index) => ({
        label: `Rename the ${index === 0 ? 'second' : 'next'} one, of type ${type}`,
        act: { kind: 'select', bead: id },
      }))
    case 'TYPE_COMPOSITION':
      return beads.slice(1).map(({ id, name }) => ({
        label: `Change the type of ${name}`,
        act: { kind: 'select', bead: id },
      }))
    case 'ATOM_UNKNOWN':
      return beads.map(({ id, name }) => ({ label: `Remove ${name}`, act: { kind: 'remove', bead: id } }))
    case 'RING_CUT':
    case 'TERMS_TOO_MANY':
      return []
  }
}

/** Beads that hold an atom bonded to one of these. */
function bondedBeads(atoms: readonly number[], unit: RepeatUnit, document: MappingDocument): Bead[] {
  const bonded = new Set(
    unit.bonds.flatMap(({ from, to }) => {
      if (atoms.includes(from) === atoms.includes(to)) return []
      return [atoms.includes(from) ? to : from]
    }),
  )
  return document.beads.filter((bead) => bead.atoms.some(({ atom }) => bonded.has(atom)))
}
