import { largestMagnitude } from '../numeric'
import { coordinateFromInternal, coordinateScale, energyScale } from '../units'
import { roundSignificant } from './format-number'
import type { Table, TableRow, TableUnits } from './table'

/** Energies and forces this much smaller than the largest of their column are rounding and become 0. */
const ROUNDING = 1e-13

/**
 * Rows of a table in users' units, rounded to the printed digits: what the screen, the JSON and the file all show.
 *
 * @returns one row per coordinate, ascending; force = −dE/dcoordinate in the units asked for
 * @example tableRows(table, { coordinateUnit: 'degree', energyUnit: 'kT' })
 */
export function tableRows(table: Table, units: TableUnits): TableRow[] {
  const energyFactor = energyScale(units.energyUnit, table.temperature)
  const forceFactor = energyFactor * coordinateScale(units.coordinateUnit)
  const leastEnergy = ROUNDING * largestMagnitude(table.energies)
  const leastForce = ROUNDING * largestMagnitude(table.forces)
  return Array.from(table.coordinates, (coordinate, row) => ({
    coordinate: roundSignificant(coordinateFromInternal(coordinate, units.coordinateUnit)),
    energy: roundSignificant(dropBelow(table.energies[row], leastEnergy) * energyFactor),
    force: roundSignificant(dropBelow(table.forces[row], leastForce) * forceFactor),
  }))
}

function dropBelow(value: number, least: number): number {
  return Math.abs(value) < least ? 0 : value
}
