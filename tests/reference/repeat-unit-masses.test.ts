import { Molecule } from 'openchemlib'
import { describe, expect, it } from 'vitest'
import { compositionMass, parseRepeatUnit } from '@shared/chemistry'
import fixture from './fixtures/atomic-weights.json'

const UNITS = {
  polyethylene_C2H4: '*CC*',
  polystyrene_C8H8: '*CC(*)c1ccccc1',
  PMMA_C5H8O2: '*CC(*)(C)C(=O)OC',
  PET_C10H8O4: '*OC(=O)c1ccc(cc1)C(=O)OCC*',
  poly_hexyl_acrylate_C9H16O2: '*CC(*)C(=O)OCCCCCC',
  polycaprolactone_C6H10O2: '*OC(=O)CCCCC*',
  nylon6_C6H11NO: '*NC(=O)CCCCC*',
} as const

/** Exact sums of abridged standard atomic weights (IUPAC 2021); tolerance as the fixture states. */
describe('repeat units read from SMILES', () => {
  it.each(Object.entries(UNITS))('%s has the formula and mass of the reference', async (name, smiles) => {
    const unit = await parseRepeatUnit(smiles)
    const key = name as keyof typeof UNITS
    expect(unit.composition).toEqual(fixture.inputs.formulas[key])
    expect(Math.abs(unit.mass - fixture.expected.repeat_unit_mass[key])).toBeLessThanOrEqual(
      fixture.tolerance.abs,
    )
  })

  it('fragments weigh what the reference says', () => {
    const { mass_CH2, mass_CH3, mass_phenyl_C6H5, mass_water_H2O } = fixture.expected.fragment_mass
    expect(compositionMass({ C: 1, H: 2 })).toBeCloseTo(mass_CH2, 9)
    expect(compositionMass({ C: 1, H: 3 })).toBeCloseTo(mass_CH3, 9)
    expect(compositionMass({ C: 6, H: 5 })).toBeCloseTo(mass_phenyl_C6H5, 9)
    expect(compositionMass({ H: 2, O: 1 })).toBeCloseTo(mass_water_H2O, 9)
  })
})

/** The chemistry library's symmetry ranks, an implementation of its own, part the atoms into the same classes. */
describe('symmetry classes', () => {
  it.each([
    ...Object.values(UNITS),
    '*c1ccc(*)cc1',
    '*Oc1ccc(cc1)C(C)(C)c1ccc(cc1)OC(*)=O',
    '*CC(*)C(=O)NC(C)C',
  ])('of %s are those of the chemistry library', async (smiles) => {
    const unit = await parseRepeatUnit(smiles)
    const molecule = Molecule.fromSmiles(smiles.replaceAll('*', '[At]'), { noCoordinates: true })
    molecule.ensureHelperArrays(Molecule.cHelperSymmetrySimple)
    const ranks = [...Array(molecule.getAllAtoms()).keys()]
      .filter((atom) => molecule.getAtomLabel(atom) !== 'At')
      .map((atom) => molecule.getSymmetryRank(atom))
    const parts = (classes: readonly number[]): number[] => classes.map((one) => classes.indexOf(one))
    expect(parts(unit.atoms.map(({ symmetryClass }) => symmetryClass))).toEqual(parts(ranks))
  })
})
