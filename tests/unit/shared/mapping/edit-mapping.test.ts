import { describe, expect, it } from 'vitest'
import { addBead, changeBead, freeAtoms, giveAtoms, type MappingDocument, removeBead } from '@shared/mapping'

const empty: MappingDocument = { version: 1, beads: [] }
const two = giveAtoms(giveAtoms(addBead(addBead(empty, 'one'), 'two'), 'one', [0, 1]), 'two', [2, 3])
const atomsOf = (document: MappingDocument) =>
  document.beads.map(({ atoms }) => atoms.map(({ atom }) => atom))

describe('editing a mapping', () => {
  it('adds beads with letters and colours of their own', () => {
    expect(two.beads.map(({ name, type, colour }) => [name, type, colour])).toEqual([
      ['A', 'A', 0],
      ['B', 'B', 1],
    ])
    const renamed = changeBead(two, 'one', { name: 'V', type: 'V' })
    expect(addBead(renamed, 'three').beads[2]).toMatchObject({ name: 'A', colour: 2 })
  })

  it('gives an atom to one bead only, whole and in order', () => {
    expect(atomsOf(giveAtoms(two, 'one', [3]))).toEqual([[0, 1, 3], [2]])
    expect(atomsOf(giveAtoms(two, 'two', [0]))).toEqual([[1], [0, 2, 3]])
    const shared: MappingDocument = {
      ...two,
      beads: two.beads.map((bead) => ({ ...bead, atoms: [{ atom: 5, weight: 0.5, unit: 0 }] })),
    }
    expect(giveAtoms(shared, 'one', [5]).beads.map(({ atoms }) => atoms)).toEqual([
      [{ atom: 5, weight: 1, unit: 0 }],
      [],
    ])
  })

  it('frees atoms and removes beads', () => {
    expect(atomsOf(freeAtoms(two, [1, 2]))).toEqual([[0], [3]])
    expect(atomsOf(removeBead(two, 'one'))).toEqual([[2, 3]])
  })

  it('hands back the same document when nothing changes', () => {
    expect(giveAtoms(two, 'one', [0])).toBe(two)
    expect(freeAtoms(two, [9])).toBe(two)
  })
})
