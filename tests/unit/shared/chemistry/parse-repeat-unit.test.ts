import { describe, expect, it } from 'vitest'
import { parseRepeatUnit, type RepeatUnit } from '@shared/chemistry'
import type { InvalidInputError } from '@shared/errors'

async function refusal(smiles: string): Promise<InvalidInputError> {
  try {
    await parseRepeatUnit(smiles)
  } catch (error) {
    return error as InvalidInputError
  }
  throw new Error(`${smiles} was accepted`)
}

const hydrogens = (unit: RepeatUnit): number[] => unit.atoms.map((atom) => atom.hydrogens)

describe('a repeat unit', () => {
  it('counts heavy atoms in SMILES order, labels them by element and leaves the * out', async () => {
    const unit = await parseRepeatUnit(' *CC(*)C(=O)OCCCCCC ')
    expect(unit.smiles).toBe('*CC(*)C(=O)OCCCCCC')
    expect(unit.atoms.map(({ label }) => label).join(' ')).toBe('C1 C2 C3 O1 O2 C4 C5 C6 C7 C8 C9')
    expect(hydrogens(unit)).toEqual([2, 1, 0, 0, 0, 2, 2, 2, 2, 2, 3])
    expect(unit.attachments).toEqual([0, 1])
    expect(unit.atoms.filter(({ attachment }) => attachment).map(({ index }) => index)).toEqual([0, 1])
    expect([unit.formula, unit.mass]).toEqual(['C9H16O2', 156.225])
  })

  it('has the bonds that are written, ring closures included', async () => {
    const { bonds, rings } = await parseRepeatUnit('*C1CC1C=N*')
    expect(bonds.map(({ from, to, order }) => `${from}-${to}:${order}`)).toEqual([
      '0-1:1',
      '1-2:1',
      '0-2:1',
      '2-3:1',
      '3-4:2',
    ])
    expect(rings).toHaveLength(1)
  })

  it.each([
    ['*c1ccc(*)cc1', '*C1=CC=C(*)C=C1'],
    ['*CC(*)C', '*C([H])([H])C(*)([H])C'],
    ['*CC(*)C', '[*:1]C[C@@H]([*:2])C'],
    ['*CC(*)C', '[1*]CC([2*])C'],
    ['*C=C*', '*/C=C/*'],
    ['*CC(*)N(=O)=O', '*CC(*)[N+]([O-])=O'],
    ['*C1CC1*', '*C%10CC%10*'],
    ['*OCC*', '[*]OCC[*]'],
  ])('is the same unit written as %s and %s', async (one, other) => {
    const [a, b] = await Promise.all([parseRepeatUnit(one), parseRepeatUnit(other)])
    const picture = (unit: RepeatUnit): unknown =>
      unit.atoms.map(({ element, hydrogens: h, charge, symmetryClass }) => [
        element,
        h,
        charge,
        symmetryClass,
      ])
    expect(picture(b)).toEqual(picture(a))
    expect([b.formula, b.mass, b.attachments]).toEqual([a.formula, a.mass, a.attachments])
  })

  it('keeps both ends on one atom where the unit has a backbone of one', async () => {
    const unit = await parseRepeatUnit('*C(C)(C)*')
    expect(unit.attachments).toEqual([0, 0])
    expect(unit.formula).toBe('C3H6')
  })

  it('may be joined by double bonds at both ends', async () => {
    const unit = await parseRepeatUnit('*=CC=*')
    expect([unit.linkOrder, unit.formula]).toEqual([2, 'C2H2'])
  })

  it('may carry charges, silicon, sulfur in high valence and aromatic heteroatoms', async () => {
    expect((await parseRepeatUnit('*C[N+](C)(C)C*')).atoms[1].charge).toBe(1)
    expect((await parseRepeatUnit('*C[Si](C)(C)O*')).formula).toBe('C3H8OSi')
    expect((await parseRepeatUnit('*S(=O)(=O)c1ccc(*)cc1')).formula).toBe('C6H4O2S')
    expect((await parseRepeatUnit('*c1ccc(*)[nH]1')).atoms[4].hydrogens).toBe(1)
    expect((await parseRepeatUnit('*c1ccc(*)s1')).atoms.every(({ aromatic, ring }) => aromatic && ring)).toBe(
      true,
    )
  })

  it('puts atoms into one class when a symmetry of the unit exchanges them', async () => {
    const unit = await parseRepeatUnit('*CC(*)c1ccccc1')
    const [, , ipso, ortho, meta, para, meta2, ortho2] = unit.atoms.map(({ symmetryClass }) => symmetryClass)
    expect([ortho2, meta2]).toEqual([ortho, meta])
    expect(new Set([ipso, ortho, meta, para]).size).toBe(4)
  })

  it('holds 200 heavy atoms and no more', async () => {
    expect((await parseRepeatUnit(`*${'C'.repeat(200)}*`)).atoms).toHaveLength(200)
    expect(await refusal(`*${'C'.repeat(201)}*`)).toMatchObject({ code: 'TOO_MANY_ATOMS' })
  })
})

describe('what is refused, with the place from 0', () => {
  it.each([
    ['', 'SMILES_UNPARSABLE', 0],
    ['*CX*', 'SMILES_UNPARSABLE', 2],
    ['*C(C*', 'SMILES_UNPARSABLE', 2],
    ['*C)C*', 'SMILES_UNPARSABLE', 2],
    ['*C()C*', 'SMILES_UNPARSABLE', 3],
    ['(*CC*)', 'SMILES_UNPARSABLE', 0],
    ['*CC*=', 'SMILES_UNPARSABLE', 4],
    ['*CC*.', 'SMILES_UNPARSABLE', 4],
    ['*C==C*', 'SMILES_UNPARSABLE', 3],
    ['*C$C*', 'SMILES_UNPARSABLE', 2],
    ['*CC1*', 'SMILES_UNPARSABLE', 3],
    ['*C1C1*', 'SMILES_UNPARSABLE', 4],
    ['*C11*', 'SMILES_UNPARSABLE', 3],
    ['*C=1CC#1*', 'SMILES_UNPARSABLE', 7],
    ['*C[CH3*', 'SMILES_UNPARSABLE', 2],
    ['*C[C++-]*', 'SMILES_UNPARSABLE', 2],
    ['*C[13CH2]*', 'SMILES_UNPARSABLE', 2],
    ['*CC* PE', 'SMILES_UNPARSABLE', 4],
    ['*c1cccc1*', 'SMILES_UNPARSABLE', 6],
    ['*c1ccc(*)n1', 'SMILES_UNPARSABLE', 9],
    ['*[nH]*', 'SMILES_UNPARSABLE', 1],
    ['*C[Xx]*', 'ELEMENT_UNKNOWN', 2],
    ['*C[At]*', 'ELEMENT_UNKNOWN', 2],
    ['CC', 'ATTACHMENT_COUNT', 0],
    ['*CC', 'ATTACHMENT_COUNT', 0],
    ['*C(*)C(*)C*', 'ATTACHMENT_COUNT', 7],
    ['*1CC1*', 'ATTACHMENT_BONDS', 0],
    ['*CC*C', 'ATTACHMENT_BONDS', 3],
    ['**', 'ATTACHMENT_BONDS', 0],
    ['*C[H]*', 'ATTACHMENT_BONDS', 5],
    ['[*H]C*', 'ATTACHMENT_BONDS', 0],
    ['*C=*', 'ATTACHMENT_BONDS', 3],
    ['*CC*.[Na+]', 'FRAGMENTS', 5],
    ['*C.C*', 'FRAGMENTS', 3],
    ['*C(C)(C)(C)*', 'VALENCE_EXCEEDED', 1],
    ['*[CH5]*', 'VALENCE_EXCEEDED', 1],
    ['*C([H])([H])([H])*', 'VALENCE_EXCEEDED', 1],
    ['*Cl*', 'VALENCE_EXCEEDED', 1],
    ['*O(C)*', 'VALENCE_EXCEEDED', 1],
  ])('%s is %s at %i', async (smiles, code, position) => {
    expect(await refusal(smiles)).toMatchObject({ code, place: { field: 'smiles', position } })
  })

  it('joins parts written with a dot when a ring closure bonds them', async () => {
    expect((await parseRepeatUnit('*C1.C1*')).bonds).toHaveLength(1)
  })

  it('says where in words, counting characters from 1', async () => {
    expect((await refusal('*CX*')).message).toContain('at character 3')
  })
})
