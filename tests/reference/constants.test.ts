import { describe, expect, it } from 'vitest'
import {
  coordinateFromInternal,
  coordinateToInternal,
  DEGREES_PER_RADIAN,
  energyFromInternal,
  GAS_CONSTANT,
  thermalEnergy,
} from '@shared/units'
import fixture from './fixtures/constants.json'

const { inputs, expected } = fixture
/** The fixture prints twelve significant digits: half a unit of the last one is up to 5e-12 of the number. */
const near = (value: number, reference: number) => expect(Math.abs(value / reference - 1)).toBeLessThan(5e-12)

/** Exact values of the 2019 SI (CODATA 2018); 1 kcal = 4.184 kJ by definition. */
describe('constants and units', () => {
  it('the gas constant is N_A k_B', () => {
    near(GAS_CONSTANT, expected.R_kJ_per_mol_K)
    expect(GAS_CONSTANT).toBe(Number(expected.R_J_per_mol_K_string) / 1000)
  })

  it.each(Object.entries(expected.kT_kJ_per_mol))('kT at %s K', (temperature, energy) => {
    near(thermalEnergy(Number(temperature)), energy)
  })

  it('lengths, angles and energies convert', () => {
    inputs.lengths_angstrom.forEach((length, index) =>
      near(coordinateToInternal(length, 'angstrom'), expected.lengths_nm[index]),
    )
    inputs.angles_deg.forEach((angle, index) =>
      near(coordinateToInternal(angle, 'degree'), expected.angles_rad[index]),
    )
    inputs.energies_kJ_per_mol.forEach((energy, index) =>
      near(energyFromInternal(energy, 'kcal/mol', 300), expected.energies_kcal_per_mol[index]),
    )
    near(DEGREES_PER_RADIAN, expected.rad_to_deg)
    near(coordinateFromInternal(1, 'degree'), expected.rad_to_deg)
  })
})
