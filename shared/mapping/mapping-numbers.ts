import type { RepeatUnit } from '../chemistry'
import { beadMass } from './bead-composition'
import type { MappingDocument } from './mapping-document'

/** Degrees of freedom a mapping keeps, and how many atoms a bead stands for. */
export interface MappingNumbers {
  /** Beads per repeat unit that hold atoms. */
  readonly beads: number
  readonly heavyAtoms: number
  /** Hydrogens included. */
  readonly atoms: number
  /** 3 per bead and 3 per atom, in each repeat unit. */
  readonly degreesKept: number
  readonly degreesBefore: number
  /** Atoms per bead, hydrogens included, and heavy atoms per bead. */
  readonly reduction: number
  readonly heavyReduction: number
  /** g/mol */
  readonly meanMass: number
  readonly lightestMass: number
  readonly heaviestMass: number
}

/**
 * How far a mapping goes.
 *
 * @returns null for a mapping without a bead that holds atoms
 * @throws {InvalidInputError} MAPPING_INVALID when a bead names an atom that the unit does not have
 */
export function mappingNumbers(unit: RepeatUnit, document: MappingDocument): MappingNumbers | null {
  const masses = document.beads.filter(({ atoms }) => atoms.length > 0).map((bead) => beadMass(unit, bead))
  const beads = masses.length
  if (beads === 0) return null
  const heavyAtoms = unit.atoms.length
  const atoms = unit.atoms.reduce((sum, { hydrogens }) => sum + 1 + hydrogens, 0)
  return {
    beads,
    heavyAtoms,
    atoms,
    degreesKept: 3 * beads,
    degreesBefore: 3 * atoms,
    reduction: atoms / beads,
    heavyReduction: heavyAtoms / beads,
    meanMass: masses.reduce((sum, mass) => sum + mass, 0) / beads,
    lightestMass: Math.min(...masses),
    heaviestMass: Math.max(...masses),
  }
}
