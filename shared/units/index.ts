export {
  ANGSTROMS_PER_NANOMETRE,
  DEGREES_PER_RADIAN,
  GAS_CONSTANT,
  KILOJOULES_PER_KILOCALORIE,
} from './constants'
export type { CoordinateKind } from './coordinate-kind'
export {
  type AngleUnit,
  coordinateFromInternal,
  coordinateScale,
  coordinateToInternal,
  type CoordinateUnit,
  type LengthUnit,
  unitsOfKind,
} from './coordinate-units'
export { ENERGY_UNITS, energyFromInternal, energyScale, type EnergyUnit } from './energy-units'
export { thermalEnergy } from './thermal-energy'
export { unitSymbol, unitWord } from './unit-symbol'
