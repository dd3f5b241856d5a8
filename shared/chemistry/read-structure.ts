import { InvalidInputError } from '../errors'
import type { BondOrder } from './repeat-unit'
import { smilesError } from './scan-atom'
import type { SmilesGraph } from './smiles-graph'

/** What the chemistry library adds to a scanned SMILES, for the same atoms and bonds in the same order. */
export interface Structure {
  readonly hydrogens: readonly number[]
  readonly charges: readonly number[]
  readonly aromaticAtoms: readonly boolean[]
  readonly ringAtoms: readonly boolean[]
  /** Orders in one localised structure. */
  readonly bondOrders: readonly BondOrder[]
  readonly aromaticBonds: readonly boolean[]
}

/**
 * Hydrogens, charges, rings, aromaticity and localised bond orders from the chemistry library, which is loaded here and only
 * here (343 kB compressed).
 *
 * The library reads `*` as a query and then counts no hydrogens, and it reorders atoms around explicit hydrogens. So both are
 * written as astatine, which has one bond, no hydrogens and no place in a polymer, and keep their places.
 *
 * @param smiles the text that `graph` was scanned from
 * @throws {InvalidInputError} SMILES_UNPARSABLE when the library cannot read it or reads other bonds
 */
export async function readStructure(smiles: string, graph: SmilesGraph): Promise<Structure> {
  const { Molecule } = await import('openchemlib')
  let molecule
  try {
    molecule = Molecule.fromSmiles(withPlaceholders(smiles, graph), { noCoordinates: true, noStereo: true })
  } catch {
    throw unreadable()
  }
  molecule.ensureHelperArrays(Molecule.cHelperRings)
  if (molecule.getAllAtoms() !== graph.atoms.length || molecule.getAllBonds() !== graph.bonds.length) {
    throw unreadable()
  }
  const atoms = graph.atoms.map((_, index) => index)
  const bonds = graph.bonds.map(({ from, to, position }) => {
    const bond = molecule.getBond(from, to)
    if (bond < 0) throw unreadable()
    const order = molecule.getBondOrder(bond)
    if (order !== 1 && order !== 2 && order !== 3) {
      throw smilesError(
        'SMILES_UNPARSABLE',
        position,
        (where) => `The bond ${where} has no order from one to three.`,
      )
    }
    return { order, aromatic: molecule.isAromaticBond(bond) } as const
  })
  return {
    hydrogens: atoms.map((atom) => molecule.getAllHydrogens(atom)),
    charges: atoms.map((atom) => molecule.getAtomCharge(atom)),
    aromaticAtoms: atoms.map((atom) => molecule.isAromaticAtom(atom)),
    ringAtoms: atoms.map((atom) => molecule.isRingAtom(atom)),
    bondOrders: bonds.map((bond) => bond.order),
    aromaticBonds: bonds.map((bond) => bond.aromatic),
  }
}

function withPlaceholders(smiles: string, graph: SmilesGraph): string {
  let text = ''
  let done = 0
  for (const { element, start, end } of graph.atoms) {
    if (element !== '*' && element !== 'H') continue
    text += smiles.slice(done, start) + '[At]'
    done = end
  }
  return text + smiles.slice(done)
}

function unreadable(): InvalidInputError {
  return new InvalidInputError('SMILES_UNPARSABLE', 'The SMILES cannot be read as one structure.', {
    field: 'smiles',
  })
}
