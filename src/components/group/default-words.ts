import type { GroupThresholds } from '@shared/contracts/group'
import { ANGLE_UNITS, ENERGY_UNITS, LENGTH_UNITS } from './unit-choices'

/** What each threshold of the verdicts does. */
export const THRESHOLD_WORDS: readonly {
  readonly name: keyof GroupThresholds
  readonly label: string
  readonly unit: string
  readonly hint: string
}[] = [
  {
    name: 'separableBelow',
    label: 'Separable below',
    unit: 'nats',
    hint: 'Mutual information of two terms that may be treated one by one',
  },
  {
    name: 'jointAbove',
    label: 'Joint potential from',
    unit: 'nats',
    hint: 'Mutual information from which a joint potential is advised',
  },
  {
    name: 'flatBelow',
    label: 'Dihedral flat below',
    unit: 'kT',
    hint: 'Rise of a potential that may be dropped',
  },
]

/** The kinds of units with those to choose from. */
export const UNIT_WORDS = [
  { name: 'length', label: 'Length', items: LENGTH_UNITS },
  { name: 'angle', label: 'Angle', items: ANGLE_UNITS },
  { name: 'energy', label: 'Energy', items: ENERGY_UNITS },
] as const
