import { lightTokens as token, type Svg, svgElement, svgEscape, svgPath } from '@shared/picture'
import type { AxisMarks } from './axis-marks'
import { BASIN_RING, placedBasins, type BasinSign } from './basin-signs'
import type { FigureFrame } from './figure-frame'

/** Leaders, numbered rings and words of the basins in the exported figure. */
export function pictureBasins(
  { distribution, potential }: FigureFrame,
  { x }: AxisMarks,
  basins: readonly BasinSign[],
): Svg {
  const base = distribution.top + distribution.height
  const floor = potential.top + potential.height
  const { radius, words } = BASIN_RING
  const text = (at: number, y: number, content: string): Svg =>
    svgElement('text', { x: at, y, 'text-anchor': 'middle', fill: token.ink2 }, svgEscape(content))
  return placedBasins(basins, x)
    .map(({ at, number, wordsAt, words: content }) =>
      [
        svgPath(`M${at} ${distribution.top}V${base}M${at} ${potential.top}V${floor - radius}`, {
          stroke: token.ink2,
          'stroke-dasharray': '1 3',
        }),
        svgElement('circle', {
          cx: at,
          cy: floor + 0.5,
          r: radius,
          fill: token.plotGround,
          stroke: token.ink2,
        }),
        text(at, floor + 4.5, String(number)),
        wordsAt === null ? '' : text(wordsAt, floor + words, content),
      ].join(''),
    )
    .join('')
}
