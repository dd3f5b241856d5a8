import { describe, expect, it } from 'vitest'
import type { Mapping } from '@shared/contracts/mapping'
import type { Polymer } from '@shared/contracts/polymer'
import { waitingFor } from '@/composables/useFrontDesk'

const polymer = (counts: Partial<Polymer['counts']> = {}): Polymer =>
  ({
    id: 'p',
    name: 'polyethylene',
    counts: { statePoints: 1, mappings: 1, distributions: 0, potentials: 0, ...counts },
  }) as Polymer
const mapping = (terms: number, termsWithData: number): Mapping =>
  ({ id: 'm', name: '1-to-1', counts: { beads: 1, terms, termsWithData } }) as Mapping
const texts = (entry: Parameters<typeof waitingFor>[0]) => waitingFor(entry).map(({ text }) => text)

describe('waitingFor', () => {
  it('asks nothing of a polymer whose terms all have data and potentials', () => {
    const done = polymer({ distributions: 6, potentials: 6 })
    expect(texts({ polymer: done, mappings: [mapping(3, 3)] })).toEqual([])
  })

  it('asks for a state point and a mapping first', () => {
    expect(texts({ polymer: polymer({ statePoints: 0 }), mappings: [] })).toEqual([
      'No state point yet',
      'No mapping yet',
    ])
  })

  it('leads terms without data to the intake, and a mapping without terms to its board', () => {
    const [beads, data] = waitingFor({ polymer: polymer(), mappings: [mapping(0, 0), mapping(3, 1)] })
    expect(beads.to).toMatchObject({ name: 'mapping', params: { mappingId: 'm' } })
    expect(data).toMatchObject({
      text: '2 terms of 3 without data',
      about: 'polyethylene, 1-to-1',
      to: { name: 'intake', params: { polymerId: 'p', mappingId: 'm' } },
    })
  })

  it('counts distributions that nobody inverted', () => {
    const half = polymer({ distributions: 5, potentials: 2 })
    expect(texts({ polymer: half, mappings: [mapping(3, 3)] })).toEqual(['3 of 5 distributions not inverted'])
  })
})
