import { describe, expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import {
  changeBead,
  checkMapping,
  giveAtoms,
  type MappingDocument,
  type MappingProblem,
  type MappingProblemCode,
  removeBead,
} from '@shared/mapping'
import { type Remedy, remedies } from '@/components/mapping/remedies'
import { bead, HEXYL_ACRYLATE, mapping } from '../../../shared/mapping/hexyl-acrylate'

const unit = await parseRepeatUnit(HEXYL_ACRYLATE)
const [backbone, ester, hexyl] = [bead('B', [0, 1]), bead('E', [2, 3, 4]), bead('H', [5, 6, 7, 8, 9, 10])]

const problem = (document: MappingDocument, code: MappingProblemCode): MappingProblem => {
  const found = checkMapping(unit, document).find((each) => each.code === code)
  if (found === undefined) throw new Error(`No ${code} in the mapping of this test`)
  return found
}
const offered = (document: MappingDocument, code: MappingProblemCode): Remedy[] =>
  remedies(problem(document, code), unit, document)

/** The document after a remedy that changes it. */
const after = (document: MappingDocument, { act }: Remedy): MappingDocument => {
  switch (act.kind) {
    case 'give':
      return giveAtoms(document, act.bead, act.atoms)
    case 'change':
      return changeBead(document, act.bead, act.change)
    case 'remove':
      return removeBead(document, act.bead)
    case 'select':
      return document
  }
}

describe('remedies', () => {
  it('offer atoms in no bead to the beads they are bonded to, and giving them mends it', () => {
    const document = mapping(backbone, ester, bead('H', [5, 6, 7, 8, 9]))
    const ways = offered(document, 'ATOM_IN_NO_BEAD')
    expect(ways.map(({ label }) => label)).toEqual(['Give it to H'])
    expect(checkMapping(unit, after(document, ways[0]))).toEqual([])
  })

  it('offer an atom whose shares do not sum to 1 to each of its holders', () => {
    const half = {
      ...bead('E', [3, 4]),
      atoms: [...bead('E', [3, 4]).atoms, { atom: 2, weight: 0.5, unit: 0 }],
    }
    const both = { ...backbone, atoms: [...backbone.atoms, { atom: 2, weight: 0.25, unit: 0 }] }
    const document = mapping(both, half, hexyl)
    const ways = offered(document, 'ATOM_SHARES')
    expect(ways.map(({ label }) => label)).toEqual(['Give C3 whole to B', 'Give C3 whole to E'])
    expect(checkMapping(unit, after(document, ways[1]))).toEqual([])
  })

  it('offer to paint with an empty bead or to remove it', () => {
    const document = mapping(backbone, ester, hexyl, bead('K', []))
    const ways = offered(document, 'BEAD_EMPTY')
    expect(ways.map(({ label }) => label)).toEqual(['Paint with K', 'Remove K'])
    expect(checkMapping(unit, after(document, ways[1]))).toEqual([])
  })

  it('offer the centre of mass to a bead that sits outside itself', () => {
    const document = mapping(backbone, ester, { ...hexyl, site: { rule: 'atom', atom: 0 } })
    const [way] = offered(document, 'SITE_OUTSIDE')
    expect(way.label).toBe('Put H at its centre of mass')
    expect(checkMapping(unit, after(document, way))).toEqual([])
  })

  it('take the bead in hand that is to be renamed or to change its type', () => {
    const twice = mapping(backbone, { ...ester, name: 'B' }, hexyl)
    expect(offered(twice, 'BEAD_NAME_TWICE').map(({ act }) => act)).toEqual([{ kind: 'select', bead: 'e' }])
    const mixed = mapping(backbone, { ...ester, type: 'B' }, hexyl)
    expect(offered(mixed, 'TYPE_COMPOSITION').map(({ label }) => label)).toEqual(['Change the type of E'])
  })

  it('take a bead in pieces in hand', () => {
    const document = mapping(
      backbone,
      { ...ester, atoms: [...ester.atoms, ...bead('x', [10]).atoms] },
      bead('H', [5, 6, 7, 8, 9]),
    )
    expect(offered(document, 'BEAD_IN_PIECES')).toEqual([
      { label: 'Paint with E', act: { kind: 'select', bead: 'e' } },
    ])
  })

  it('are at most three', () => {
    const document = mapping(...[0, 1, 2, 3, 4].map((atom) => bead(`A${atom}`, [atom], { name: 'A' })))
    expect(problem(document, 'BEAD_NAME_TWICE').beads).toHaveLength(5)
    expect(offered(document, 'BEAD_NAME_TWICE')).toHaveLength(3)
  })
})
