import type { Table } from '../tables'
import { coordinateScale, energyScale } from '../units'
import { kindLayout, type Layout } from './layout'
import type { LayoutCells } from './layout-cells'

/** The numbers of a file as whoever reads it gets them, and what rounding took from them. */
export interface PrintedNumbers {
  /** In the unit of the layout. */
  readonly coordinates: Float64Array
  /** kT */
  readonly energies: Float64Array
  /** kT per unit of the coordinate column, whatever unit the force column is in. */
  readonly forces: Float64Array
  /** Distance between two rows before rounding. */
  readonly step: number
}

/** Reads the cells of a file back. */
export function printedNumbers(
  table: Table,
  layout: Layout,
  cells: LayoutCells,
  step: number,
): PrintedNumbers {
  const { coordinateUnit, energyUnit, force } = kindLayout(layout, table.kind)
  const kT = energyScale('kT', table.temperature)
  const energyFactor = kT / energyScale(energyUnit, table.temperature)
  const forceFactor =
    ((kT / energyScale(force.energyUnit, table.temperature)) * coordinateScale(coordinateUnit)) /
    coordinateScale(force.per)
  return {
    coordinates: Float64Array.from(cells.coordinate, Number),
    energies: Float64Array.from(cells.energy, (cell) => Number(cell) * energyFactor),
    forces: Float64Array.from(cells.force, (cell) => Number(cell) * forceFactor),
    step,
  }
}

/**
 * The integral of the forces over each step from row to row, by the cubic through four neighbours (through three at the ends), times
 * −1: what the energies ought to gain.
 */
export function forceSteps({ forces, step }: PrintedNumbers): Float64Array {
  const last = forces.length - 1
  return Float64Array.from({ length: last }, (_, row) => {
    const [here, next] = [forces[row], forces[row + 1]]
    if (last < 2) return (-step * (here + next)) / 2
    if (row === 0) return (-step * (5 * here + 8 * next - forces[2])) / 12
    if (row === last - 1) return (-step * (5 * next + 8 * here - forces[last - 2])) / 12
    return (-step * (13 * (here + next) - forces[row - 1] - forces[row + 2])) / 24
  })
}
