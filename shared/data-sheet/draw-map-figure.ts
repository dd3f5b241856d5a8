import type { MapFigure } from '../contracts/data-sheet'
import { italic, lightTokens, type Svg, svgElement, svgEscape, svgNumber, svgPath } from '../picture'
import { FIGURE } from './draw-curve-figure'
import { MAP_LIMIT } from './map-figure'
import { mapInk } from './map-inks'
import { niceTicks } from './nice-ticks'
import { fixedWords } from './number-words'
import { axisHead, label, sheetSvg } from './sheet-svg'

const TOP = 26
const BOTTOM = 122
const LEFT = 30
const WIDTH = 92
const SECOND = LEFT + WIDTH + 28
/** Density is drawn as p^0.6, as on screen. */
const DENSITY_POWER = 0.6
const HAIR = { stroke: lightTokens.plotAxis, 'stroke-width': 0.7 }

/** The figure of a joint table: the measured density on the left, the potential in steps of 1 kT on the right. */
export function drawMapFigure(figure: MapFigure, name: string): Svg {
  const density = figure.measured.map((value) => value ** DENSITY_POWER)
  const energies = figure.energies.map((value) =>
    value >= MAP_LIMIT ? 0 : 1 - Math.floor(value) / MAP_LIMIT,
  )
  return sheetSvg(
    FIGURE.width,
    FIGURE.height,
    `${name}: measured density on the left, joint potential on the right`,
    map(figure, LEFT, density),
    map(figure, SECOND, energies),
    label('measured', LEFT, TOP - 17),
    label(`${italic('U')}${svgEscape(' of the table')}`, SECOND, TOP - 17),
    label(
      `${svgEscape(`${figure.names[1]}, `)}${axisHead(figure.kinds[1], figure.coordinateUnits[1])}`,
      0,
      TOP - 6,
    ),
    key(LEFT, ['0', 'most'], (share) => share ** DENSITY_POWER),
    key(SECOND, ['0', `${MAP_LIMIT} `], (share) => 1 - Math.floor(share * MAP_LIMIT) / MAP_LIMIT),
  )
}

function map(figure: MapFigure, left: number, shares: readonly number[]): Svg {
  const { columns, rows, x: spanX, y: spanY, coordinateUnits } = figure
  const [cellWidth, cellHeight] = [WIDTH / columns, (BOTTOM - TOP) / rows]
  const inks = new Map<string, string>()
  shares.forEach((share, cell) => {
    const ink = mapInk(share)
    if (share <= 0.02) return
    const x = left + Math.floor(cell / rows) * cellWidth
    const y = BOTTOM - ((cell % rows) + 1) * cellHeight
    const square = `M${svgNumber(x)} ${svgNumber(y)}h${svgNumber(cellWidth + 0.15)}v${svgNumber(cellHeight + 0.15)}h${svgNumber(-cellWidth - 0.15)}z`
    inks.set(ink, (inks.get(ink) ?? '') + square)
  })
  const [scaleX, scaleY] = [scale(spanX, left, left + WIDTH), scale(spanY, BOTTOM, TOP)]
  const ticksX = niceTicks(spanX[0], spanX[1], 4, coordinateUnits[0] === '°')
  const ticksY = niceTicks(spanY[0], spanY[1], 5, coordinateUnits[1] === '°')
  const marks = [
    ...ticksX.values.map((value) => `M${svgNumber(scaleX(value))} ${BOTTOM}v3`),
    ...ticksY.values.map((value) => `M${left} ${svgNumber(scaleY(value))}h-3`),
  ]
  return [
    ...[...inks].map(([fill, d]) => svgPath(d, { fill })),
    svgPath(`M${left} ${TOP}V${BOTTOM}H${left + WIDTH}${marks.join('')}`, HAIR),
    ...ticksX.values.map((value) =>
      label(fixedWords(value, ticksX.decimals), scaleX(value), BOTTOM + 11, { 'text-anchor': 'middle' }),
    ),
    ...ticksY.values.map((value) =>
      label(fixedWords(value, ticksY.decimals), left - 5, scaleY(value) + 2.6, { 'text-anchor': 'end' }),
    ),
    label(
      `${svgEscape(`${figure.names[0]}, `)}${axisHead(figure.kinds[0], coordinateUnits[0])}`,
      left + WIDTH,
      BOTTOM + 21,
      { 'text-anchor': 'end' },
    ),
  ].join('')
}

/** What the shades mean, from left to right. */
function key(left: number, [low, high]: readonly [string, string], share: (at: number) => number): Svg {
  const steps = 16
  const width = 40 / steps
  const y = BOTTOM + 32
  const energy = high !== 'most'
  return [
    ...Array.from({ length: steps }, (_, step) =>
      svgElement('rect', {
        x: left + 8 + step * width,
        y,
        width: width + 0.1,
        height: 5,
        fill: mapInk(share((step + (energy ? 0 : 0.5)) / steps)),
      }),
    ),
    label(low, left + 5, y + 5, { 'text-anchor': 'end' }),
    label(energy ? `${high}${italic('kT')}` : high, left + 51, y + 5),
  ].join('')
}

function scale([low, high]: readonly number[], from: number, to: number): (value: number) => number {
  return (value) => from + ((value - low) / (high - low)) * (to - from)
}
