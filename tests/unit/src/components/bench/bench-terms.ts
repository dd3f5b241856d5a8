import type { MappingDocument, Term } from '@shared/contracts/mapping'

const uuid = (number: number): string => `00000000-0000-4000-8000-${String(number).padStart(12, '0')}`
const BEADS: Readonly<Record<string, string>> = { B: 'bead-b', E: 'bead-e', H: 'bead-h' }

/** A term of the mapping below, named by its types: term('angle', 'BEH'). */
export const term = (kind: Term['kind'], types: string, change: Partial<Term> = {}): Term => ({
  id: uuid([...types].reduce((sum, letter) => 100 * sum + letter.charCodeAt(0), 0) % 1e12),
  mappingId: uuid(3),
  kind,
  types: [...types],
  name: [...types].join('–'),
  places: [[...types].map((type) => ({ bead: BEADS[type], unit: 0 }))],
  current: true,
  standing: 'data',
  silhouette: { measured: [0, 1, 0], derived: null },
  distributionId: uuid(4),
  ...change,
})

const bead = (name: string, colour: number): MappingDocument['beads'][number] => ({
  id: BEADS[name],
  name,
  type: name,
  label: '',
  colour,
  site: { rule: 'mass' },
  atoms: [{ atom: colour, weight: 1, unit: 0 }],
})

/** Backbone, ester and hexyl. */
export const mappingDocument: MappingDocument = {
  version: 1,
  beads: [bead('B', 0), bead('E', 1), bead('H', 2)],
}
