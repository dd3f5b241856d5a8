import type { Bead, MappingDocument } from '../../shared/mapping/mapping-document'
import type { ModelBead } from './chain-model'

/** The demonstration's polymer. Atoms: 0, 1 backbone; 2 to 4 ester; 5 to 10 hexyl. */
export const DEMO_POLYMER = {
  name: 'poly(n-hexyl acrylate)',
  smiles: '*CC(*)C(=O)OCCCCCC',
  notes:
    'Invented demonstration. The distributions come from a small stochastic model of a chain, not from any simulation or measurement of this polymer.',
} as const

/** A mapping of the demonstration, and which bead of the chain model each of its beads is. */
export interface DemoMapping {
  readonly name: string
  readonly document: MappingDocument
  readonly models: Readonly<Record<string, ModelBead>>
}

const backbone = bead('backbone', 'B', 'backbone', 0, [0, 1])
const ester = bead('ester', 'E', 'ester', 1, [2, 3, 4])

export const THREE_TO_ONE: DemoMapping = {
  name: '3-to-1',
  document: {
    version: 1,
    beads: [backbone, ester, bead('hexyl', 'H', 'hexyl', 2, [5, 6, 7, 8, 9, 10])],
  },
  models: { backbone: 'B', ester: 'E', hexyl: 'H' },
}

export const FIVE_TO_ONE: DemoMapping = {
  name: '5-to-1',
  document: {
    version: 1,
    beads: [
      backbone,
      ester,
      bead('side-1', 'S1', 'first of the side chain', 2, [5, 6]),
      bead('side-2', 'S2', 'second of the side chain', 3, [7, 8]),
      bead('side-3', 'S3', 'end of the side chain', 4, [9, 10]),
    ],
  },
  models: { backbone: 'B', ester: 'E', 'side-1': 'S1', 'side-2': 'S2', 'side-3': 'S3' },
}

function bead(id: string, name: string, label: string, colour: number, atoms: number[]): Bead {
  return {
    id,
    name,
    type: name,
    label,
    colour,
    site: { rule: 'mass' },
    atoms: atoms.map((atom) => ({ atom, weight: 1, unit: 0 })),
  }
}
