import type { GroupUnits } from '@shared/contracts/group'

type Choice<Unit> = readonly { readonly value: Unit; readonly title: string }[]

export const LENGTH_UNITS: Choice<GroupUnits['length']> = [
  { value: 'nm', title: 'nm' },
  { value: 'angstrom', title: 'Å' },
]
export const ANGLE_UNITS: Choice<GroupUnits['angle']> = [
  { value: 'degree', title: 'degree' },
  { value: 'radian', title: 'radian' },
]
export const ENERGY_UNITS: Choice<GroupUnits['energy']> = [
  { value: 'kJ/mol', title: 'kJ/mol' },
  { value: 'kcal/mol', title: 'kcal/mol' },
  { value: 'kT', title: 'kT' },
]
