import type { CoordinateKind, CoordinateUnit, EnergyUnit } from '../units'

/** A potential on equally spaced coordinates, both ends included; internal units. */
export interface Table {
  readonly kind: CoordinateKind
  /** K */
  readonly temperature: number
  /** Ascending, nm or rad. */
  readonly coordinates: Float64Array
  /** kJ/mol */
  readonly energies: Float64Array
  /** −dU/dq in kJ/mol per nm or rad. */
  readonly forces: Float64Array
}

/** Units a table is shown and written in. */
export interface TableUnits {
  readonly coordinateUnit: CoordinateUnit
  readonly energyUnit: EnergyUnit
}

/** One row in users' units, rounded to the printed digits; force = −dE/dcoordinate in those units. */
export interface TableRow {
  readonly coordinate: number
  readonly energy: number
  readonly force: number
}
