import { InvalidInputError } from '../errors'
import { tableDomain } from '../inversion'
import {
  type CoordinateKind,
  coordinateFromInternal,
  coordinateScale,
  type CoordinateUnit,
  energyScale,
  type EnergyUnit,
} from '../units'
import { roundSignificant } from '../tables'
import { jointEnergy, jointSlopes, type JointSurface } from './joint-surface'

/** Fewest and most rows along one axis: with the most, a file has a quarter of a million rows. */
export const JOINT_ROWS = { low: 2, high: 500 } as const
/** Rows along an axis unless the user says otherwise: one a degree for angles, every other degree for dihedrals. */
export const DEFAULT_JOINT_ROWS: Record<CoordinateKind, number> = { bond: 101, angle: 181, dihedral: 181 }
/** Numbers this much smaller than the largest of their column are rounding and become 0. */
const ROUNDING = 1e-13

/** Extent of one axis of a joint table; null takes the default of the kind (`tableDomain`, `DEFAULT_JOINT_ROWS`). */
export interface JointTableAxis {
  readonly rows: number | null
  /** nm or rad. */
  readonly low: number | null
  readonly high: number | null
}

export interface JointTableSettings {
  readonly x: JointTableAxis
  readonly y: JointTableAxis
}

/** The default extent along both axes. */
export const DEFAULT_JOINT_TABLE: JointTableSettings = {
  x: { rows: null, low: null, high: null },
  y: { rows: null, low: null, high: null },
}

/** A joint potential on a grid of equally spaced coordinates, ends included; internal units. */
export interface JointTable {
  readonly kinds: readonly [CoordinateKind, CoordinateKind]
  /** K */
  readonly temperature: number
  /** Ascending, nm or rad. */
  readonly x: Float64Array
  readonly y: Float64Array
  /** kJ/mol, row-major, index ix · ny + iy. */
  readonly energies: Float64Array
  /** −∂U/∂x in kJ/mol per nm or rad, laid out as the energies. */
  readonly xForces: Float64Array
  /** −∂U/∂y */
  readonly yForces: Float64Array
}

/** Units a joint table is written in. */
export interface JointTableUnits {
  readonly coordinateUnits: readonly [CoordinateUnit, CoordinateUnit]
  readonly energyUnit: EnergyUnit
}

/** One row in users' units, rounded to the printed digits; forces are −dE/dcoordinate in those units. */
export interface JointTableRow {
  readonly x: number
  readonly y: number
  readonly energy: number
  readonly xForce: number
  readonly yForce: number
}

/**
 * Tabulates a joint potential on equally spaced coordinates; energies and both forces come from the same spline.
 *
 * @param settings bounds in nm or rad
 * @throws {InvalidInputError} SETTING_INVALID as `tableDomain`, or when an axis has fewer or more rows than `JOINT_ROWS`
 */
export function jointTable(surface: JointSurface, settings: JointTableSettings): JointTable {
  const [x, y] = [gridAlong(surface, 0, settings.x), gridAlong(surface, 1, settings.y)]
  const cells = x.length * y.length
  const [energies, xForces, yForces] = [0, 1, 2].map(() => new Float64Array(cells))
  for (let cell = 0; cell < cells; cell++) {
    const [atX, atY] = [x[Math.floor(cell / y.length)], y[cell % y.length]]
    const [alongX, alongY] = jointSlopes(surface, atX, atY)
    energies[cell] = jointEnergy(surface, atX, atY)
    xForces[cell] = -alongX
    yForces[cell] = -alongY
  }
  const kinds = [surface.axes[0].kind, surface.axes[1].kind] as const
  return { kinds, temperature: surface.temperature, x, y, energies, xForces, yForces }
}

/**
 * Rows of a joint table in users' units: the first coordinate outside, ascending, the second inside.
 *
 * @throws {InvalidInputError} TEMPERATURE_INVALID when energies are asked for in kT of no valid temperature
 */
export function jointTableRows(table: JointTable, units: JointTableUnits): JointTableRow[] {
  const [xUnit, yUnit] = units.coordinateUnits
  const scale = energyScale(units.energyUnit, table.temperature)
  const energies = column(table.energies, scale)
  const xForces = column(table.xForces, scale * coordinateScale(xUnit))
  const yForces = column(table.yForces, scale * coordinateScale(yUnit))
  const ny = table.y.length
  return Array.from(table.energies, (_, cell) => ({
    x: roundSignificant(coordinateFromInternal(table.x[Math.floor(cell / ny)], xUnit)),
    y: roundSignificant(coordinateFromInternal(table.y[cell % ny], yUnit)),
    energy: energies[cell],
    xForce: xForces[cell],
    yForce: yForces[cell],
  }))
}

function column(values: Float64Array, scale: number): Float64Array {
  const least = ROUNDING * values.reduce((most, value) => Math.max(most, Math.abs(value)), 0)
  return values.map((value) => roundSignificant(Math.abs(value) < least ? 0 : value * scale))
}

function gridAlong(surface: JointSurface, axis: 0 | 1, settings: JointTableAxis): Float64Array {
  const { kind, populated } = surface.axes[axis]
  const rows = settings.rows ?? DEFAULT_JOINT_ROWS[kind]
  if (!(Number.isInteger(rows) && rows >= JOINT_ROWS.low && rows <= JOINT_ROWS.high)) {
    throw new InvalidInputError(
      'SETTING_INVALID',
      `A joint table has a whole number of rows from ${JOINT_ROWS.low} to ${JOINT_ROWS.high} along each coordinate.`,
      { field: 'rows' },
    )
  }
  const [low, high] = tableDomain(kind, { populated }, { rows, low: settings.low, high: settings.high })
  const step = (high - low) / (rows - 1)
  return Float64Array.from({ length: rows }, (_, row) => (row === rows - 1 ? high : low + row * step))
}
