import {
  unitSymbol,
  type AngleUnit,
  type CoordinateKind,
  type CoordinateUnit,
  type EnergyUnit,
  type LengthUnit,
} from '@shared/units'

/** The units a person reads the bench in. */
export interface DisplayUnits {
  readonly length: LengthUnit
  readonly angle: AngleUnit
  readonly energy: EnergyUnit
}

/** How a coordinate is called on axes and in sentences. */
export interface CoordinateNames {
  /** Set in italics: r, θ, φ. */
  readonly symbol: string
  /** Beside the axis: nm, deg. */
  readonly axisUnit: string
  /** After a value, with the blank it needs: " nm", "°". */
  readonly valueSuffix: string
  /** Unit of a distribution per natural unit: "%/deg", "1/nm". */
  readonly densityUnit: string
  /** Factor from probability per unit to the density shown. */
  readonly densityFactor: number
  /** The Jacobian in words and symbols, null where it is constant. */
  readonly jacobian: { readonly before: string; readonly symbol: string; readonly after: string } | null
}

const SYMBOLS: Record<CoordinateKind, string> = { bond: 'r', angle: 'θ', dihedral: 'φ' }

const JACOBIANS: Record<CoordinateKind, CoordinateNames['jacobian']> = {
  bond: { before: '', symbol: 'r', after: '²' },
  angle: { before: 'sin ', symbol: 'θ', after: '' },
  dihedral: null,
}

/** The unit of a kind of coordinate among the chosen ones. */
export function coordinateUnitOf(kind: CoordinateKind, units: DisplayUnits): CoordinateUnit {
  return kind === 'bond' ? units.length : units.angle
}

/** Names and units of a kind of coordinate. Angles in degrees are counted in per cent per degree. */
export function coordinateNames(kind: CoordinateKind, units: DisplayUnits): CoordinateNames {
  const unit = coordinateUnitOf(kind, units)
  const degrees = unit === 'degree'
  const axisUnit = degrees ? 'deg' : unitSymbol(unit)
  return {
    symbol: SYMBOLS[kind],
    axisUnit,
    valueSuffix: degrees ? '°' : `\u00a0${axisUnit}`,
    densityUnit: degrees ? '%/deg' : `1/${axisUnit}`,
    densityFactor: degrees ? 100 : 1,
    jacobian: JACOBIANS[kind],
  }
}
