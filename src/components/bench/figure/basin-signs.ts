import type { CurveBasins } from '@shared/basins'
import { coordinateFromInternal, type CoordinateUnit } from '@shared/units'
import { fixedText } from '@/components/figure/number-text'
import type { LinearScale } from '@/components/figure/linear-scale'
import { numberedBasins } from '../basin-words'
import type { FigureAxes } from './figure-model'

/** A basin as the figure marks it: number, place in the unit shown, and its position and population in words. */
export interface BasinSign {
  readonly number: number
  readonly coordinate: number
  readonly words: string
}

/** Radius of a numbered ring on the bottom rule, and where the words stand under the rule. */
export const BASIN_RING = { radius: 7.5, words: 24 } as const
/** Width of a letter of the words, in pixels, on average. */
const LETTER = 6.1
const GAP = 6

/** Signs of basins from left to right. */
export function basinSigns(
  found: CurveBasins,
  unit: CoordinateUnit,
  { names, degrees }: Pick<FigureAxes, 'names' | 'degrees'>,
): BasinSign[] {
  return numberedBasins(found).map(({ number, coordinate, population }) => {
    const shown = coordinateFromInternal(coordinate, unit)
    const place = fixedText(shown, degrees ? 1 : 3) + names.valueSuffix
    return { number, coordinate: shown, words: `${place}, ${fixedText(100 * population)}\u00a0%` }
  })
}

/** A sign at its pixel; words that would run into their left neighbour's are left out, the ring stays. */
export interface PlacedBasin extends BasinSign {
  readonly at: number
  /** Centre of the words, kept within the panel; null where there is no room. */
  readonly wordsAt: number | null
}

/** Places signs on the shared axis; those outside the shown range are left out. */
export function placedBasins(signs: readonly BasinSign[], x: LinearScale): PlacedBasin[] {
  const [left, right] = x.range
  let taken = -Infinity
  return signs
    .filter(({ coordinate }) => coordinate >= x.domain[0] && coordinate <= x.domain[1])
    .map((sign) => {
      const at = Math.round(x.at(sign.coordinate) - 0.5) + 0.5
      const half = (LETTER * sign.words.length) / 2
      const centre = Math.min(right + GAP - half, Math.max(left - GAP + half, at))
      const fits = centre - half > taken + GAP
      if (fits) taken = centre + half
      return { ...sign, at, wordsAt: fits ? centre : null }
    })
}
