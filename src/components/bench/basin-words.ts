import type { CurveBasin, CurveBasins } from '@shared/basins'
import { thermalEnergy } from '@shared/units'
import { errorText } from './error-text'

/** A hundredth of kT is as fine as a barrier is ever known. */
const DECIMALS = 2

/** A basin with its number along the coordinate, as the figure numbers it. */
export interface NumberedBasin extends CurveBasin {
  readonly number: number
}

/** Basins from left to right. */
export function numberedBasins({ basins }: CurveBasins): NumberedBasin[] {
  return [...basins]
    .sort((one, other) => one.coordinate - other.coordinate)
    .map((basin, index) => ({ ...basin, number: index + 1 }))
}

/**
 * The barriers in a line: between two basins as seen from each of them, with more from each that is not the lowest.
 *
 * @param temperature K
 * @returns null with one basin
 */
export function barrierLine(
  basins: readonly NumberedBasin[],
  temperature: number,
): { readonly label: string; readonly text: string; readonly two: boolean } | null {
  const left = basins.filter(({ depth }) => depth !== null)
  const [only] = left
  if (only === undefined) return null
  if (basins.length !== 2) {
    const numbers = left.map(({ number }) => number).join(', ')
    const text = left.map(({ depth, deviation }) => errorText(depth!, deviation, DECIMALS)).join('; ')
    return { label: `Barrier from basin ${numbers}`, text, two: false }
  }
  const height = (only.barrier?.energy ?? 0) / thermalEnergy(temperature)
  const fromEach = basins.map(({ depth, energy }) => depth ?? height - energy / thermalEnergy(temperature))
  // Both share the top and its error.
  const text = `${errorText(fromEach[0], null, DECIMALS)}, ${errorText(fromEach[1], only.deviation, DECIMALS)}`
  return { label: 'Barrier from basin 1, 2', text, two: true }
}
