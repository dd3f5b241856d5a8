import type { StatePoint } from '@shared/contracts/polymer'
import { formatShort } from './numbers'

/** A state point in a word or two: "400 K, melt". */
export const statePointName = (statePoint: Pick<StatePoint, 'temperature' | 'phase'>): string =>
  [`${formatShort(statePoint.temperature)} K`, statePoint.phase].filter((part) => part !== '').join(', ')

/** A state point with all that tells it from its neighbours: "400 K, 1 bar, melt, 20 % water". */
export const statePointDescription = (
  statePoint: Pick<StatePoint, 'temperature' | 'pressure' | 'phase' | 'composition'>,
): string =>
  [
    `${formatShort(statePoint.temperature)} K`,
    statePoint.pressure === null ? '' : `${formatShort(statePoint.pressure)} bar`,
    statePoint.phase,
    statePoint.composition,
  ]
    .filter((part) => part !== '')
    .join(', ')
