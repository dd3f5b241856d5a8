import { InvalidInputError } from '../errors'
import {
  type Potential,
  potentialEnergy,
  potentialSlope,
  tableDomain,
  type TableSettings,
} from '../inversion'
import { thermalEnergy } from '../units'
import type { Table } from './table'

/**
 * Tabulates a potential on equally spaced coordinates, both ends included; energies and forces come from the same spline.
 * With a cap, energies bend over within kT below it and stay at the cap, without a jump of the force: with
 * w = min(kT, cap)/2, U becomes U − (U − cap + w)²/4w between cap − w and cap + w, and the cap above.
 *
 * @param settings bounds in nm or rad (null for the default of the kind), cap in kJ/mol or null
 * @returns `settings.rows` rows, force = −dU/dq of the energy column
 * @throws {InvalidInputError} SETTING_INVALID as `tableDomain`, or when the cap is not above 0
 */
export function makeTable(potential: Potential, settings: TableSettings): Table {
  const { kind, temperature } = potential
  const [low, high] = tableDomain(kind, potential, settings)
  const { rows, cap } = settings
  if (cap !== null && !(cap > 0 && Number.isFinite(cap))) {
    throw new InvalidInputError('SETTING_INVALID', 'The cap must be an energy above 0.', { field: 'cap' })
  }
  const step = (high - low) / (rows - 1)
  const coordinates = Float64Array.from({ length: rows }, (_, row) =>
    row === rows - 1 ? high : low + row * step,
  )
  const energies = coordinates.map((coordinate) => potentialEnergy(potential, coordinate))
  const forces = coordinates.map((coordinate) => -potentialSlope(potential, coordinate))
  if (cap !== null) levelOff(energies, forces, cap, Math.min(thermalEnergy(temperature), cap) / 2)
  return { kind, temperature, coordinates, energies, forces }
}

function levelOff(energies: Float64Array, forces: Float64Array, cap: number, width: number): void {
  energies.forEach((energy, row) => {
    const above = energy - cap + width
    if (above <= 0) return
    const share = Math.min(above / (2 * width), 1)
    energies[row] = above >= 2 * width ? cap : energy - (above * above) / (4 * width)
    forces[row] *= 1 - share
  })
}
