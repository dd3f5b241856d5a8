import {
  coordinateFromInternal,
  type CoordinateUnit,
  energyScale,
  type EnergyUnit,
  unitSymbol,
} from '../units'
import type { FormFit, ParameterDimension } from './form'

/** A parameter in the units of a user. */
export interface ShownParameter {
  readonly name: string
  readonly value: number
  readonly standardError: number | null
  /** Such as kJ/mol/nm², kcal/mol/deg² or °; empty for a pure number. */
  readonly unit: string
  readonly atBound: boolean
}

const POWERS: Record<number, string> = { 2: '²', 3: '³', 4: '⁴' }

/**
 * Parameters of a form in the units of a user: the same formula then holds with coordinates and energies in these units.
 *
 * @param coordinateUnit one of the kind's
 * @example parametersInUnits(fit, 'angstrom', 'kcal/mol') // k in kcal/mol/Å²
 */
export function parametersInUnits(
  { parameters, temperature }: Pick<FormFit, 'parameters' | 'temperature'>,
  coordinateUnit: CoordinateUnit,
  energyUnit: EnergyUnit,
): ShownParameter[] {
  return parameters.map(({ name, value, standardError, dimension, atBound }) => {
    const factor =
      energyScale(energyUnit, temperature) ** dimension.energy *
      coordinateFromInternal(1, coordinateUnit) ** dimension.coordinate
    return {
      name,
      value: value * factor,
      standardError: standardError && standardError * factor,
      unit: parameterUnit(dimension, coordinateUnit, energyUnit),
      atBound,
    }
  })
}

/** The unit of a parameter as text; degrees are ° alone and deg inside a unit. */
function parameterUnit(
  { energy, coordinate }: ParameterDimension,
  coordinateUnit: CoordinateUnit,
  energyUnit: EnergyUnit,
): string {
  const head = energy === 1 ? unitSymbol(energyUnit) : ''
  if (coordinate === 0) return head
  const symbol = unitSymbol(coordinateUnit)
  if (coordinate > 0) return symbol
  const power = POWERS[-coordinate] ?? ''
  return `${head || '1'}/${coordinateUnit === 'degree' ? 'deg' : symbol}${power}`
}
