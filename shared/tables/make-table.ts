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
  checkCap(cap)
  const step = (high - low) / (rows - 1)
  const coordinates = Float64Array.from({ length: rows }, (_, row) =>
    row === rows - 1 ? high : low + row * step,
  )
  const energies = new Float64Array(rows)
  const forces = new Float64Array(rows)
  coordinates.forEach((coordinate, row) => {
    const point = pointAt(potential, cap, coordinate)
    energies[row] = point.energy
    forces[row] = point.force
  })
  return { kind, temperature, coordinates, energies, forces }
}

/**
 * What a table of a potential has at any coordinate, also beyond its first and last row.
 *
 * @param cap kJ/mol or null, as in `makeTable`
 * @param coordinate nm or rad, within the domain of the kind
 * @returns energy in kJ/mol, force −dU/dq of that energy
 * @throws {InvalidInputError} SETTING_INVALID when the cap is not above 0
 */
export function tablePoint(potential: Potential, cap: number | null, coordinate: number): TablePoint {
  checkCap(cap)
  return pointAt(potential, cap, coordinate)
}

interface TablePoint {
  readonly energy: number
  readonly force: number
}

function checkCap(cap: number | null): void {
  if (cap !== null && !(cap > 0 && Number.isFinite(cap))) {
    throw new InvalidInputError('SETTING_INVALID', 'The cap must be an energy above 0.', { field: 'cap' })
  }
}

function pointAt(potential: Potential, cap: number | null, coordinate: number): TablePoint {
  const energy = potentialEnergy(potential, coordinate)
  const force = -potentialSlope(potential, coordinate)
  if (cap === null) return { energy, force }
  const width = Math.min(thermalEnergy(potential.temperature), cap) / 2
  const above = energy - cap + width
  if (above <= 0) return { energy, force }
  const share = Math.min(above / (2 * width), 1)
  return {
    energy: above >= 2 * width ? cap : energy - (above * above) / (4 * width),
    force: force * (1 - share),
  }
}
