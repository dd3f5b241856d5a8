import { coordinateDomain } from '@shared/histogram'
import { coordinateFromInternal, energyScale, type CoordinateKind } from '@shared/units'
import { coordinateNames, coordinateUnitOf, type DisplayUnits } from '@/components/figure/coordinate-names'
import { secondEnergy, type FigureAxes } from './figure-model'

/** Where bonds between beads usually lie, nm: what the axis of an empty figure shows. */
const USUAL_BOND = [0.2, 0.6] as const
/** Height of the axes of an empty figure: per cent per degree and per unit, and kJ/mol. */
const USUAL_DENSITY = 3
const USUAL_ENERGY = 30

/** The real axes of a term that has no data yet. */
export function emptyAxes(kind: CoordinateKind, units: DisplayUnits, temperature: number): FigureAxes {
  const unit = coordinateUnitOf(kind, units)
  const ends = kind === 'bond' ? USUAL_BOND : coordinateDomain(kind)
  const energyTop = USUAL_ENERGY * energyScale(units.energy, temperature)
  return {
    kind,
    names: coordinateNames(kind, units),
    energyUnit: units.energy,
    degrees: unit === 'degree',
    domain: [coordinateFromInternal(ends[0], unit), coordinateFromInternal(ends[1], unit)],
    densityTop: USUAL_DENSITY,
    energyDomain: [-0.05 * energyTop, energyTop],
    secondEnergy: secondEnergy(units.energy, temperature),
  }
}
