import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { parseRepeatUnit, type RepeatUnit } from '@shared/chemistry'
import {
  acceptProposal,
  deriveTerms,
  type MappingDocument,
  proposeTerms,
  setPooling,
  setTermUse,
  type TermEvidence,
  termGroups,
  type TermProposal,
  termUse,
} from '@shared/mapping'
import { bead, HEXYL_ACRYLATE, mapping, THREE_TO_ONE } from './hexyl-acrylate'
import { POLYMERS } from './polymers'

const acrylate = await parseRepeatUnit(HEXYL_ACRYLATE)

function proposals(unit: RepeatUnit, document: MappingDocument, evidence?: TermEvidence): TermProposal[] {
  const terms = deriveTerms(unit, document)
  return proposeTerms(unit, document, termGroups(unit, document, terms), evidence)
}

/** Centre, used and left-out terms of each group. */
function words(all: readonly TermProposal[]): string[] {
  const list = (terms: TermProposal['used']): string => terms.map(({ name }) => name).join(' ')
  return all.map(({ group, used, leftOut }) => `${group.centre}: ${list(used)} | ${list(leftOut)}`)
}

describe('groups of terms', () => {
  it('join what turns about one bond and what meets at one bead', () => {
    const groups = termGroups(acrylate, THREE_TO_ONE, deriveTerms(acrylate, THREE_TO_ONE))
    expect(
      groups.map(({ kind, centre, places, degrees, surplus }) => [kind, centre, places, degrees, surplus]),
    ).toEqual([
      ['angle', 'B', 3, 3, 0],
      ['dihedral', 'B–B', 4, 1, 3],
      ['dihedral', 'B–E', 2, 1, 1],
    ])
  })

  it('are none in a chain without branches', async () => {
    const unit = await parseRepeatUnit(POLYMERS['poly(ethylene oxide)'])
    expect(
      termGroups(unit, mapping(bead('A', [0, 1, 2])), deriveTerms(unit, mapping(bead('A', [0, 1, 2])))),
    ).toEqual([])
  })
})

describe('the proposed set', () => {
  it('keeps the dihedral along the backbone, and every angle where three meet', () => {
    const proposed = proposals(acrylate, THREE_TO_ONE)
    expect(words(proposed)).toEqual([
      'B: B–B–B B–B–E | ',
      'B–B: B–B–B–B | B–B–B–E E–B–B–E',
      'B–E: B–B–E–H | ',
    ])
    expect(proposed.every(({ basis }) => basis === 'rule')).toBe(true)
    expect(proposed[1].sentence).toContain('B–B–B–B runs along the backbone')
  })

  it('keeps one of two split kinds about a bond', () => {
    const document = setPooling(THREE_TO_ONE, ['B', 'B', 'E', 'H'], 'split')
    expect(words(proposals(acrylate, document))[2]).toBe('B–E: B–B–E–H (1) | B–B–E–H (2)')
  })

  it('leaves out the sixth angle at a bead with four neighbours', async () => {
    const unit = await parseRepeatUnit('*C(CCC)(CCCC)*')
    const document = mapping(bead('B', [0]), bead('S', [1, 2, 3]), bead('T', [4, 5, 6, 7]))
    expect(words(proposals(unit, document))[0]).toBe('B: B–B–B B–B–S B–B–T | S–B–T')
  })

  it('is as large as the degrees of freedom where no kind stands twice about a bond', async () => {
    const unit = await parseRepeatUnit(POLYMERS.polystyrene)
    const document = mapping(bead('B', [0, 1]), bead('R', [2, 3, 4, 5, 6, 7]))
    const accepted = proposals(unit, document).reduce(acceptProposal, document)
    const use = termUse(unit, accepted, deriveTerms(unit, accepted))
    expect(use).toMatchObject({
      degrees: 6,
      counted: { bond: 2, angle: 3, dihedral: 1 },
      surplus: 0,
      unheld: [],
    })
    expect(use.sentence).toContain('each motion once')
    expect(use.leftOut.map(({ term }) => term.name)).toEqual(['B–B–B–R', 'R–B–B–R'])
    expect(use.leftOut[0].reason).toBe(proposals(unit, document)[1].sentence)
  })
})

describe('data', () => {
  const samples = (counts: Record<string, number>) => new Map(Object.entries(counts))

  it('choose the kind that is sampled best', () => {
    const evidence = { samples: samples({ 'B–B–B–B': 100, 'E–B–B–E': 1000 }), couplings: [] }
    const [, backbone] = proposals(acrylate, THREE_TO_ONE, evidence)
    expect(backbone.used.map(({ name }) => name)).toEqual(['E–B–B–E'])
    expect(backbone.basis).toBe('data')
  })

  it('choose among kinds sampled alike the one coupled least to what is outside the group', () => {
    const evidence = {
      samples: samples({ 'B–B–B–B': 1000, 'B–B–B–E': 900, 'E–B–B–E': 800 }),
      couplings: [
        { first: 'B–B–B–B', second: 'B–B–B', nats: 0.2 },
        { first: 'B–B–E', second: 'B–B–B–E', nats: 0.05 },
        { first: 'B–B–E', second: 'E–B–B–E', nats: 0.1 },
        // Inside the group, where only one is kept: it decides nothing.
        { first: 'B–B–B–E', second: 'E–B–B–E', nats: 3 },
      ],
    }
    const [, backbone] = proposals(acrylate, THREE_TO_ONE, evidence)
    expect(backbone.used.map(({ name }) => name)).toEqual(['B–B–B–E'])
    expect(backbone.sentence).toContain('0.05 nats')
    expect(backbone.sentence).toContain('900 independent samples')
  })

  it('change nothing where there are none, and leave ties to the rule', () => {
    const names = deriveTerms(acrylate, THREE_TO_ONE).map(({ name }) => name)
    const byRule = proposals(acrylate, THREE_TO_ONE)
    expect(proposals(acrylate, THREE_TO_ONE, { samples: new Map(), couplings: [] })).toEqual(byRule)
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 1e6 }),
        fc.double({ min: 0, max: 2, noNaN: true }),
        (count, nats) => {
          // The same samples for all, and the same coupling of each to the one bond that is in no group.
          const alike = {
            samples: new Map(names.map((name) => [name, count])),
            couplings: names.map((name) => ({ first: 'B–E', second: name, nats })),
          }
          expect(words(proposals(acrylate, THREE_TO_ONE, alike))).toEqual(words(byRule))
        },
      ),
      { numRuns: 25 },
    )
  })
})

it('says what is left free when a whole group is left out', () => {
  const terms = deriveTerms(acrylate, THREE_TO_ONE)
  const about = terms.filter(({ name }) => name === 'B–B–E–H')
  const document = about.reduce((mapped, term) => setTermUse(mapped, term, 'left out'), THREE_TO_ONE)
  const use = termUse(acrylate, document, terms)
  expect(use.unheld.map(({ centre }) => centre)).toEqual(['B–E'])
  expect(use.sentence).toContain('Nothing is used about B–E.')
})
