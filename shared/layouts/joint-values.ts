import { InvalidInputError } from '../errors'
import type { JointTable } from '../joint-potential'
import { type CoordinateKind, coordinateFromInternal, coordinateScale, energyScale } from '../units'
import { kindLayout, type Layout } from './layout'
import { rangeOf, readingOf } from './layout-grid'
import { scaled } from './layout-values'

/** One axis of a joint table in a layout. */
export interface JointLayoutAxis {
  readonly kind: CoordinateKind
  /** As written, ascending, in the unit of the layout. */
  readonly written: Float64Array
  /** Which value of the table's own axis stands there. */
  readonly places: readonly number[]
  readonly sign: 1 | -1
}

/** The numbers of a joint table in the units and the order of a layout, before rounding; row-major with x outside. */
export interface JointLayoutValues {
  readonly axes: readonly [JointLayoutAxis, JointLayoutAxis]
  readonly energies: Float64Array
  readonly xForces: Float64Array
  readonly yForces: Float64Array
}

/**
 * Puts a joint table into the units, sense and order of a layout. Its places stay its own, so that no number is made up between
 * them: coordinates are turned or shifted, and rows follow. Numbers and limits of rows are for single tables.
 *
 * @throws {InvalidInputError} TEMPERATURE_INVALID when energies are asked for in kT of no valid temperature; LAYOUT_INVALID when the
 *   part of the turn that the table covers falls apart in the range of the layout
 */
export function jointLayoutValues(table: JointTable, layout: Layout): JointLayoutValues {
  const { kinds, temperature } = table
  const axes = [axisOf(layout, kinds[0], table.x), axisOf(layout, kinds[1], table.y)] as const
  const [x, y] = axes
  const ny = table.y.length
  const laid = (values: Float64Array, sign: number, factor: number): Float64Array => {
    const ordered = new Float64Array(x.places.length * y.places.length)
    x.places.forEach((ix, column) =>
      y.places.forEach((iy, row) => (ordered[column * y.places.length + row] = sign * values[ix * ny + iy])),
    )
    return scaled(ordered, factor)
  }
  // One energy column serves both coordinates: it is in the unit of x.
  const forceFactor = (kind: CoordinateKind): number => {
    const { energyUnit, per } = kindLayout(layout, kind).force
    return energyScale(energyUnit, temperature) * coordinateScale(per)
  }
  return {
    axes,
    energies: laid(table.energies, 1, energyScale(kindLayout(layout, kinds[0]).energyUnit, temperature)),
    xForces: laid(table.xForces, x.sign, forceFactor(kinds[0])),
    yForces: laid(table.yForces, y.sign, forceFactor(kinds[1])),
  }
}

function axisOf(layout: Layout, kind: CoordinateKind, own: Float64Array): JointLayoutAxis {
  const { coordinateUnit: unit } = kindLayout(layout, kind)
  const { sign, shift } = readingOf(layout, kind)
  const last = own.length - 1
  const span = own[last] - own[0]
  const turned = kind === 'dihedral' && span > 2 * Math.PI - 1e-9
  const [least] = kind === 'dihedral' ? rangeOf(layout) : [-Infinity]
  const read = (place: number): number => {
    const value = sign * own[place] + shift
    // Rounding must not send the start of the range to its end.
    return kind === 'dihedral'
      ? value - 2 * Math.PI * Math.floor((value - least) / (2 * Math.PI) + 1e-12)
      : value
  }
  const places = Array.from({ length: turned ? last : last + 1 }, (_, place) => place)
  places.sort((one, other) => read(one) - read(other))
  const coordinates = places.map(read)
  if (coordinates[coordinates.length - 1] - coordinates[0] > span + 1e-9) throw inTwoPieces()
  if (turned && layout.dihedral.repeatEnd) {
    places.push(places[0])
    coordinates.push(coordinates[0] + 2 * Math.PI)
  }
  const tiny = 1e-13 * span
  const written = Float64Array.from(coordinates, (value) =>
    coordinateFromInternal(Math.abs(value) < tiny ? 0 : value, unit),
  )
  return { kind, written, places, sign }
}

function inTwoPieces(): InvalidInputError {
  return new InvalidInputError(
    'LAYOUT_INVALID',
    'In the range of this layout the rows of the dihedral would lie in two pieces.',
    { field: 'dihedral.range' },
  )
}
