import { describe, expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import {
  compareMappings,
  deriveTerms,
  type MappingDocument,
  type MappingEvidence,
  setTermUse,
  type TermFinding,
} from '@shared/mapping'
import { FIVE_TO_ONE, HEXYL_ACRYLATE, mapping, THREE_TO_ONE } from './hexyl-acrylate'

const acrylate = await parseRepeatUnit(HEXYL_ACRYLATE)

const finding = (count: number, change: Partial<TermFinding> = {}): TermFinding => ({
  basins: { count, depth: 0.5 },
  deviation: 0.02,
  flatness: null,
  ...change,
})

function evidence(
  name: string,
  document: MappingDocument,
  findings: Record<string, TermFinding> = {},
  pairs: MappingEvidence['pairs'] = [],
): MappingEvidence {
  return {
    name,
    document,
    terms: deriveTerms(acrylate, document),
    findings: new Map(Object.entries(findings)),
    pairs,
  }
}

const coarse = evidence(
  '3-to-1',
  THREE_TO_ONE,
  { 'B–E': finding(1), 'E–H': finding(3), 'B–B–B–B': finding(3, { flatness: 'keep' }) },
  [{ first: 'E–H', second: 'B–E–H', nats: 0.31 }],
)
const fine = evidence(
  '5-to-1',
  FIVE_TO_ONE,
  {
    'B–E': finding(1),
    'E–S1': finding(1),
    'S1–S2': finding(1),
    'S2–S3': finding(1),
    'E–S1–S2–S3': finding(1, { flatness: 'flat' }),
  },
  [
    { first: 'E–S1', second: 'B–E–S1', nats: 0.01 },
    { first: 'S1–S2', second: 'E–S1–S2', nats: 0.02 },
  ],
)

describe('comparing mappings', () => {
  it('says that the hexyl bond of the coarse one is many-peaked, and what the fine one costs', () => {
    const { summary } = compareMappings(acrylate, [coarse, fine])
    expect(summary).toEqual([
      'In 3-to-1 the bond E–H has 3 basins deeper than 0.5 kT; in 5-to-1 each of the 4 bonds and angles counted has a single basin. ' +
        'Correlation left behind: 0.31 nats over 1 pair in 3-to-1, 0.03 nats over 2 pairs in 5-to-1. ' +
        '5-to-1 costs 2 beads more per unit, 6 terms more and about 2.8 times the pairs per step. ' +
        '11 of its 16 terms have no data yet.',
    ])
  })

  it('does not depend on the order in which mappings are given', () => {
    expect(compareMappings(acrylate, [fine, coarse]).summary).toEqual(
      compareMappings(acrylate, [coarse, fine]).summary,
    )
  })

  it('counts terms, data, peaks, coupling and what may be dropped', () => {
    const [first, second] = compareMappings(acrylate, [coarse, fine]).mappings
    expect(first).toMatchObject({ termsWithData: 3, basinsCounted: 3, coupling: 0.31, cost: 1, leftOut: 0 })
    expect(first.manyPeaked.map(({ name }) => name)).toEqual(['E–H', 'B–B–B–B'])
    expect(first.droppable).toEqual([])
    expect(second.droppable.map(({ name }) => name)).toEqual(['E–S1–S2–S3'])
    expect(second.pairs.map(({ nats }) => nats)).toEqual([0.02, 0.01])
    // (5/3)² pairs.
    expect(second.cost).toBeCloseTo(25 / 9, 12)
  })

  it('drops no dihedral that nobody could judge', () => {
    const undecided = evidence('5-to-1', FIVE_TO_ONE, { 'E–S1–S2–S3': finding(1, { flatness: 'undecided' }) })
    const [column] = compareMappings(acrylate, [undecided]).mappings
    expect(column.droppable).toEqual([])
    expect(column.terms.find(({ name }) => name === 'E–S1–S2–S3')?.droppable).toBeNull()
  })

  it('counts only terms in use, and pairs between them', () => {
    const left = { types: ['E', 'H'], placeKey: '' }
    const document = setTermUse(THREE_TO_ONE, left, 'left out', 'to see')
    const [column] = compareMappings(acrylate, [{ ...coarse, document }, fine]).mappings
    expect(column).toMatchObject({ leftOut: 1, termsWithData: 2, coupling: null })
    expect(column.terms).toHaveLength(9)
  })

  it('claims nothing about peaks that nobody counted', () => {
    const bare = [evidence('coarse', THREE_TO_ONE), evidence('fine', FIVE_TO_ONE)]
    const [sentence] = compareMappings(acrylate, bare).summary
    expect(sentence).toMatch(/^No basins of bonds or angles were counted in coarse or fine/)
    expect(sentence).not.toContain('nats')
    const half = compareMappings(acrylate, [coarse, evidence('fine', FIVE_TO_ONE)]).summary[0]
    expect(half).toContain('in fine no basins were counted')
  })

  it('compares each of three with the next coarser, and has nothing to say about a mapping without beads', () => {
    const four = evidence('4-to-1', {
      ...FIVE_TO_ONE,
      beads: FIVE_TO_ONE.beads.slice(0, 4),
    })
    const { summary, mappings } = compareMappings(acrylate, [fine, coarse, evidence('none', mapping()), four])
    expect(summary).toHaveLength(2)
    expect(summary[1]).toContain('5-to-1 costs 1 bead more')
    expect(mappings[2]).toMatchObject({ numbers: null, cost: null, terms: [] })
  })
})
