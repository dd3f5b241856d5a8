import { describe, expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import { beadMass, suggestMappings } from '@shared/mapping'
import { POLYMERS } from '../unit/shared/mapping/polymers'
import fixture from './fixtures/atomic-weights.json'

/** Structural formulas of the repeat units, written out by hand from their names; from memory. */
const FORMULAS: Record<keyof typeof POLYMERS, Readonly<Record<string, number>>> = {
  'poly(n-hexyl acrylate)': { C: 9, H: 16, O: 2 },
  'poly(methyl methacrylate)': { C: 5, H: 8, O: 2 },
  'poly(ethylene terephthalate)': { C: 10, H: 8, O: 4 },
  'bisphenol A polycarbonate': { C: 16, H: 14, O: 3 },
  'polyamide 6': { C: 6, H: 11, N: 1, O: 1 },
  'polyamide 6,6': { C: 12, H: 22, N: 2, O: 2 },
  polystyrene: { C: 8, H: 8 },
  'poly(ethylene oxide)': { C: 2, H: 4, O: 1 },
  'poly(dimethyl siloxane)': { C: 2, H: 6, O: 1, Si: 1 },
  'poly(3-hexylthiophene)': { C: 10, H: 14, S: 1 },
  'poly(vinyl alcohol)': { C: 2, H: 4, O: 1 },
  'poly(vinyl acetate)': { C: 4, H: 6, O: 2 },
  'poly(lactic acid)': { C: 3, H: 4, O: 2 },
}
const WEIGHTS: Readonly<Record<string, number>> = fixture.expected.atomic_weight_abridged_2021

/** Abridged standard atomic weights 2021 (IUPAC), as the fixture names its source. */
describe.each(Object.entries(POLYMERS))('%s', (name, smiles) => {
  const formula = FORMULAS[name as keyof typeof POLYMERS]
  const mass = Object.entries(formula).reduce((sum, [element, count]) => sum + count * WEIGHTS[element], 0)

  it('has its formula and the sum of its atomic weights', async () => {
    const unit = await parseRepeatUnit(smiles)
    expect(unit.composition).toEqual(formula)
    // Masses are rounded to 1e-9 g/mol.
    expect(Math.abs(unit.mass - mass)).toBeLessThan(2e-9)
  })

  it('weighs as much in beads, however many', async () => {
    const unit = await parseRepeatUnit(smiles)
    for (const { document, beads } of suggestMappings(unit)) {
      const sum = document.beads.reduce((total, bead) => total + beadMass(unit, bead), 0)
      // Each bead's mass is rounded to 1e-9 g/mol.
      expect(Math.abs(sum - mass)).toBeLessThan(2e-9 * beads)
    }
  })
})
