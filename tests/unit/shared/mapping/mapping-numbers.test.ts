import { describe, expect, it } from 'vitest'
import { formulaText, parseRepeatUnit } from '@shared/chemistry'
import { endBeads, estimateGain, mappingNumbers } from '@shared/mapping'
import { bead, HEXYL_ACRYLATE, mapping, THREE_TO_ONE } from './hexyl-acrylate'
import { POLYMERS } from './polymers'

const acrylate = await parseRepeatUnit(HEXYL_ACRYLATE)

describe('the numbers of a mapping', () => {
  it('count beads against all atoms and heavy atoms', () => {
    // C9H16O2: 27 atoms, 11 of them heavy; 156.225 g/mol.
    expect(mappingNumbers(acrylate, THREE_TO_ONE)).toMatchObject({
      beads: 3,
      heavyAtoms: 11,
      atoms: 27,
      degreesKept: 9,
      degreesBefore: 81,
      reduction: 9,
      lightestMass: 27.046,
      heaviestMass: 85.17,
    })
    expect(mappingNumbers(acrylate, THREE_TO_ONE)?.heavyReduction).toBeCloseTo(11 / 3, 12)
    expect(mappingNumbers(acrylate, THREE_TO_ONE)?.meanMass).toBeCloseTo(156.225 / 3, 9)
  })

  it('leave out beads without atoms, and are none without beads', () => {
    const empty = mapping(...THREE_TO_ONE.beads, bead('X', []))
    expect(mappingNumbers(acrylate, empty)).toEqual(mappingNumbers(acrylate, THREE_TO_ONE))
    expect(mappingNumbers(acrylate, mapping(bead('X', [])))).toBeNull()
  })
})

/** Analytic: pairs go as sites² at one density, and with the cube of the cutoff. */
describe('the estimated gain', () => {
  it('is the square of the reduction by the cube of the cutoff, times the time step', () => {
    expect(estimateGain(9, { cutoffRatio: 1, timeStepRatio: 5 })).toMatchObject({
      pairs: 81,
      steps: 5,
      total: 405,
    })
    expect(estimateGain(9, { cutoffRatio: 2, timeStepRatio: 1 }).total).toBeCloseTo(81 / 8, 12)
  })

  it('states what it assumes', () => {
    const sentences = estimateGain(4, { cutoffRatio: 1.5, timeStepRatio: 8 }).sentences.join(' ')
    expect(sentences).toContain('1.5 times')
    expect(sentences).toContain('8 times')
  })

  it.each([0, -1, NaN, Infinity])('refuses a reduction of %d', (reduction) => {
    expect(() => estimateGain(reduction)).toThrow(expect.objectContaining({ code: 'SETTING_INVALID' }))
  })
})

describe('the beads at the ends of a chain', () => {
  it('carry a hydrogen more', () => {
    const ends = endBeads(acrylate, THREE_TO_ONE)
    expect(ends.map(({ end, bead: id, composition }) => `${end} ${id} ${formulaText(composition)}`)).toEqual([
      'head b C2H4',
      'tail b C2H4',
    ])
    expect(ends[0].mass).toBeCloseTo(27.046 + 1.008, 9)
  })

  it('are told apart at a polyester, with their notes', async () => {
    const unit = await parseRepeatUnit(POLYMERS['poly(ethylene terephthalate)'])
    const document = mapping(
      bead('A', [0, 1, 2], { endGroup: 'acid' }),
      bead('R', [3, 4, 5, 6, 7, 8]),
      bead('C', [9, 10, 11, 12, 13]),
    )
    expect(endBeads(unit, document).map(({ end, bead: id, note }) => [end, id, note])).toEqual([
      ['head', 'a', 'acid'],
      ['tail', 'c', ''],
    ])
  })

  it('include those that reach over the end, in halves that make up one bead', async () => {
    const unit = await parseRepeatUnit('*CC*')
    const document = mapping(
      bead('A', [], {
        atoms: [
          { atom: 1, weight: 1, unit: 0 },
          { atom: 0, weight: 1, unit: 1 },
        ],
      }),
    )
    const ends = endBeads(unit, document)
    expect(ends.map(({ end, composition, missing }) => [end, formulaText(composition), missing])).toEqual([
      ['head', 'CH3', [1]],
      ['tail', 'CH3', [0]],
    ])
  })
})
