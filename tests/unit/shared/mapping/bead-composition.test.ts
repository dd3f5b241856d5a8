import fc from 'fast-check'
import { expect, it } from 'vitest'
import { formulaText, parseRepeatUnit } from '@shared/chemistry'
import { beadComposition, beadMass } from '@shared/mapping'
import { bead, FIVE_TO_ONE, HEXYL_ACRYLATE } from './hexyl-acrylate'

const acrylate = await parseRepeatUnit(HEXYL_ACRYLATE)

it('counts the hydrogens on the atoms of a bead', () => {
  const formulas = FIVE_TO_ONE.beads.map((one) => formulaText(beadComposition(acrylate, one)))
  expect(formulas).toEqual(['C2H3', 'CO2', 'C2H4', 'C2H4', 'C2H5'])
  expect(FIVE_TO_ONE.beads.map((one) => beadMass(acrylate, one))).toEqual([
    27.046, 44.009, 28.054, 28.054, 29.062,
  ])
})

it('sums to the mass of the unit however atoms are shared out', () => {
  const share = fc.record({
    split: fc.integer({ min: 0, max: 11 }),
    weight: fc.double({ min: 0.01, max: 0.99, noNaN: true }),
  })
  fc.assert(
    fc.property(share, ({ split, weight }) => {
      const one = (atom: number) => ({ atom, weight: 1, unit: 0 })
      const first = acrylate.atoms.slice(0, split).map(({ index }) => one(index))
      const rest = acrylate.atoms.slice(split).map(({ index }) => one(index))
      const moved = rest.shift()
      if (moved) {
        first.push({ ...moved, weight })
        rest.unshift({ ...moved, weight: 1 - weight })
      }
      const mass = [first, rest].reduce((sum, atoms) => sum + beadMass(acrylate, bead('A', [], { atoms })), 0)
      // Each bead's mass is rounded to 1e-9 g/mol.
      expect(Math.abs(mass - acrylate.mass)).toBeLessThan(2e-9)
    }),
  )
})

it('is nothing for a bead without atoms, and refuses atoms that the unit does not have', () => {
  expect(beadMass(acrylate, bead('A', []))).toBe(0)
  expect(() => beadMass(acrylate, bead('A', [11]))).toThrow(
    expect.objectContaining({ code: 'MAPPING_INVALID' }),
  )
})
