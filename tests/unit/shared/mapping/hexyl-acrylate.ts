import type { Bead, MappingDocument } from '@shared/mapping'

export const HEXYL_ACRYLATE = '*CC(*)C(=O)OCCCCCC'

/** A bead of whole atoms of its own unit, sitting at its centre of mass. */
export function bead(name: string, atoms: readonly number[], change: Partial<Bead> = {}): Bead {
  return {
    id: name.toLowerCase(),
    name,
    type: name,
    label: '',
    colour: 0,
    site: { rule: 'mass' },
    atoms: atoms.map((atom) => ({ atom, weight: 1, unit: 0 })),
    ...change,
  }
}

export function mapping(...beads: Bead[]): MappingDocument {
  return { version: 1, beads }
}

export const THREE_TO_ONE = mapping(bead('B', [0, 1]), bead('E', [2, 3, 4]), bead('H', [5, 6, 7, 8, 9, 10]))

export const FIVE_TO_ONE = mapping(
  bead('B', [0, 1]),
  bead('E', [2, 3, 4]),
  bead('S1', [5, 6]),
  bead('S2', [7, 8]),
  bead('S3', [9, 10]),
)
