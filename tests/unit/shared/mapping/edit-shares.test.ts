import { describe, expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import { beadMass, checkMapping, deriveTerms, giveAtomAcross, setShare, shareAtom } from '@shared/mapping'
import { bead, HEXYL_ACRYLATE, mapping, THREE_TO_ONE } from './hexyl-acrylate'

const acrylate = await parseRepeatUnit(HEXYL_ACRYLATE)
const codes = (document: typeof THREE_TO_ONE): string[] =>
  checkMapping(acrylate, document).map(({ code }) => code)

describe('shared atoms', () => {
  it('belong to each bead in equal parts, in masses as well', () => {
    const shared = shareAtom(THREE_TO_ONE, 4, ['e', 'h'])
    expect(codes(shared)).toEqual([])
    const masses = shared.beads.map((one) => beadMass(acrylate, one))
    expect(masses[1]).toBeCloseTo(44.009 - 15.999 / 2, 9)
    expect(masses.reduce((sum, mass) => sum + mass, 0)).toBeCloseTo(acrylate.mass, 8)
  })

  it('take thirds without a complaint', () => {
    expect(codes(shareAtom(THREE_TO_ONE, 2, ['b', 'e', 'h']))).not.toContain('ATOM_SHARES')
  })

  it('take other shares, which are checked', () => {
    const shared = shareAtom(THREE_TO_ONE, 4, ['e', 'h'])
    const uneven = setShare(shared, 'e', { atom: 4, unit: 0 }, 0.7)
    expect(codes(uneven)).toEqual(['ATOM_SHARES'])
    expect(codes(setShare(uneven, 'h', { atom: 4, unit: 0 }, 0.3))).toEqual([])
  })

  it('come back to one bead', () => {
    const shared = shareAtom(THREE_TO_ONE, 4, ['e', 'h'])
    expect(shareAtom(shared, 4, ['e'])).toEqual(THREE_TO_ONE)
  })
})

describe('atoms of the next unit', () => {
  it('join a bead across the border and leave the bead that held them', async () => {
    const moved = giveAtomAcross(THREE_TO_ONE, 'b', { atom: 0, unit: 1 })
    expect(moved.beads[0].atoms).toEqual([
      { atom: 1, weight: 1, unit: 0 },
      { atom: 0, weight: 1, unit: 1 },
    ])
    expect(codes(moved)).toEqual([])
    // Held from the wrong side, the two atoms are not bonded.
    expect(codes(giveAtomAcross(THREE_TO_ONE, 'b', { atom: 0, unit: -1 }))).toEqual(['BEAD_IN_PIECES'])
    const unit = await parseRepeatUnit('*CCCC*')
    const halves = mapping(bead('A', [0, 1]), bead('B', [2, 3]))
    const shifted = giveAtomAcross(giveAtomAcross(halves, 'a', { atom: 2, unit: 0 }), 'b', {
      atom: 0,
      unit: 1,
    })
    expect(checkMapping(unit, shifted)).toEqual([])
    expect(deriveTerms(unit, shifted).map(({ name }) => name)).toEqual(
      deriveTerms(unit, halves).map(({ name }) => name),
    )
  })
})
