import { composition, compositionMass, type Composition, type RepeatUnit } from '../chemistry'
import { InvalidInputError } from '../errors'
import type { Bead } from './mapping-document'

/**
 * What a bead is made of: its atoms with their hydrogens, each counted with its weight.
 *
 * @throws {InvalidInputError} MAPPING_INVALID when the bead names an atom that the unit does not have
 */
export function beadComposition(unit: RepeatUnit, bead: Bead): Composition {
  const atoms = bead.atoms.map(({ atom }) => {
    if (atom >= unit.atoms.length) {
      throw new InvalidInputError(
        'MAPPING_INVALID',
        `Bead ${bead.name} names atom ${atom + 1}; the repeat unit has ${unit.atoms.length}.`,
        { field: 'document', index: atom },
      )
    }
    return unit.atoms[atom]
  })
  return composition(
    atoms,
    bead.atoms.map(({ weight }) => weight),
  )
}

/**
 * Mass of a bead with its hydrogens, shared atoms by their weights.
 *
 * @returns g/mol
 * @throws {InvalidInputError} MAPPING_INVALID as `beadComposition`
 */
export function beadMass(unit: RepeatUnit, bead: Bead): number {
  return compositionMass(beadComposition(unit, bead))
}
