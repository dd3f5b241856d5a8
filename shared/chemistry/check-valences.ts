import { smilesError } from './scan-atom'
import type { SmilesAtom, SmilesGraph } from './smiles-graph'
import type { Structure } from './read-structure'
import { isNormalValence, largestNormalValence, largestValence } from './valence'

/**
 * Whether every atom can have the bonds it is written with. The readers are lenient here: carbon with five bonds and
 * aromatic rings without alternating double bonds pass them.
 *
 * @throws {InvalidInputError} VALENCE_EXCEEDED or, for an aromatic ring that cannot be, SMILES_UNPARSABLE, with the position
 */
export function checkValences(graph: SmilesGraph, structure: Structure): void {
  const bonded = new Array<number>(graph.atoms.length).fill(0)
  graph.bonds.forEach(({ from, to }, index) => {
    bonded[from] += structure.bondOrders[index]
    bonded[to] += structure.bondOrders[index]
  })
  graph.atoms.forEach((atom, index) => {
    if (atom.element === '*') return
    const hydrogens = atom.element === 'H' ? atom.hydrogens : structure.hydrogens[index]
    const charge = structure.charges[index]
    const valence = bonded[index] + hydrogens
    const most =
      atom.bracket || charge !== 0 ? largestValence(atom.element, charge) : largestNormalValence(atom.element)
    if (most !== null && valence > most) {
      throw smilesError(
        'VALENCE_EXCEEDED',
        atom.start,
        (where) =>
          `${named(atom.element, charge)} ${where} has ${valence} bonds, hydrogens included; it can have ${most}.`,
      )
    }
    if (atom.aromatic) checkAromatic(atom, structure.ringAtoms[index], hydrogens, valence)
  })
}

/** A ring nitrogen that needs a hydrogen must say so: n and [nH] are different rings. */
function checkAromatic(atom: SmilesAtom, inRing: boolean, hydrogens: number, valence: number): void {
  if (!inRing || (atom.bracket && hydrogens !== atom.hydrogens)) {
    throw smilesError(
      'SMILES_UNPARSABLE',
      atom.start,
      (where) => `The atom ${where} is written as aromatic (small letter) but cannot be.`,
    )
  }
  if (atom.bracket) return
  const silentHydrogen = atom.element !== 'C' && hydrogens > 0
  if (silentHydrogen || !isNormalValence(atom.element, valence)) {
    throw smilesError(
      'SMILES_UNPARSABLE',
      atom.start,
      (where) =>
        `The aromatic ring with the atom ${where} has no alternating double bonds. A ring nitrogen that carries a hydrogen is written [nH].`,
    )
  }
}

function named(element: string, charge: number): string {
  if (charge === 0) return element
  const size = Math.abs(charge) === 1 ? '' : String(Math.abs(charge))
  return `${element}${size}${charge > 0 ? '+' : '−'}`
}
