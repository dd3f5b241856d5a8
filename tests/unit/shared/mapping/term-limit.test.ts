import { describe, expect, it } from 'vitest'
import { parseRepeatUnit, type RepeatUnit } from '@shared/chemistry'
import { MAX_BEADS, mappingDocumentSchema } from '@shared/contracts/mapping'
import { checkMapping, deriveTerms, MAX_TERM_PLACES, type MappingDocument } from '@shared/mapping'
import { bead, FIVE_TO_ONE, HEXYL_ACRYLATE, mapping } from './hexyl-acrylate'

const LETTERS = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz'

/** `count` beads with names and types of their own, each with the atoms that `atomsOf` gives it. */
function beads(count: number, atomsOf: (index: number) => readonly number[]): MappingDocument {
  return mapping(
    ...Array.from({ length: count }, (_, index) =>
      bead(LETTERS[index], atomsOf(index), { id: `b${index}`, type: `T${index}` }),
    ),
  )
}

const allAtoms = (unit: RepeatUnit) => unit.atoms.map(({ index }) => index)
const codes = (unit: RepeatUnit, document: MappingDocument) =>
  checkMapping(unit, document).map(({ code }) => code)

describe('a mapping whose beads all share all atoms', () => {
  it.each([
    ['two atoms', '*CC*', 12],
    ['two atoms', '*CC*', MAX_BEADS],
    ['eleven atoms', HEXYL_ACRYLATE, MAX_BEADS],
  ])('of %s in %s is refused with a sentence, by %i beads', async (_, smiles, count) => {
    const unit = await parseRepeatUnit(smiles)
    const document = beads(count, () => allAtoms(unit))
    expect(() => deriveTerms(unit, document)).toThrow(
      expect.objectContaining({
        code: 'MAPPING_INVALID',
        place: { field: 'document' },
        message: expect.stringContaining(`more than ${MAX_TERM_PLACES} places`) as unknown,
      }),
    )
    expect(codes(unit, document)).toContain('TERMS_TOO_MANY')
  })

  it('is refused as well when each bead names one atom as often as the contract lets it', async () => {
    const unit = await parseRepeatUnit('*CC*')
    const often = beads(MAX_BEADS, () => Array.from({ length: 400 }, (_, index) => index % 2))
    expect(mappingDocumentSchema.safeParse(often).success).toBe(true)
    expect(() => deriveTerms(unit, often)).toThrow(expect.objectContaining({ code: 'MAPPING_INVALID' }))
  })
})

describe('a mapping that people make', () => {
  it('is never refused: a backbone bead with 39 side beads stays within half the limit', async () => {
    const unit = await parseRepeatUnit(`*${'C(C)'.repeat(MAX_BEADS - 1)}*`)
    const sides = unit.atoms.filter(({ hydrogens }) => hydrogens === 3).map(({ index }) => index)
    const backbone = allAtoms(unit).filter((index) => !sides.includes(index))
    const comb = beads(MAX_BEADS, (index) => (index === 0 ? backbone : [sides[index - 1]]))
    const places = deriveTerms(unit, comb).reduce((sum, term) => sum + term.places.length, 0)
    expect(places).toBe(2460)
    expect(places).toBeLessThan(MAX_TERM_PLACES / 2)
    expect(codes(unit, comb)).toEqual([])
  })

  it('shows no problem of this kind', async () => {
    expect(codes(await parseRepeatUnit(HEXYL_ACRYLATE), FIVE_TO_ONE)).toEqual([])
  })
})
