import type { CurveFigure } from '../contracts/data-sheet'
import { italic, lightTokens, type Svg, svgElement, svgEscape, svgNumber, svgPath } from '../picture'
import { curveLine, type FigurePoint, interpolated } from './figure-lines'
import { niceTicks } from './nice-ticks'
import { fixedWords } from './number-words'
import { axisHead, label, sheetSvg } from './sheet-svg'

/** Of every figure of a sheet, pt. */
export const FIGURE = { width: 246, height: 166 } as const

const LEFT = 30
const RIGHT = 4
const UPPER = { top: 15, bottom: 66 } as const
const LOWER = { top: 96, bottom: 163 } as const
const SPINE = { label: 78.5, tick: 3 } as const
const { plotAxis, plotGrid, data, dataEdge, model, band, raw } = lightTokens
const HAIR = { stroke: plotAxis, 'stroke-width': 0.7 }

/** The figure of a single table: distribution above, potential below, on one axis between them. */
export function drawCurveFigure(figure: CurveFigure, name: string): Svg {
  const [low, high] = figure.shown
  const x = (value: number): number => LEFT + ((value - low) / (high - low)) * (FIGURE.width - LEFT - RIGHT)
  return sheetSvg(
    FIGURE.width,
    FIGURE.height,
    `${name}: measured distribution and that of the table above, potential with its band below`,
    distribution(figure, x),
    potential(figure, x),
    spine(figure, x),
  )
}

type Scale = (value: number) => number

function distribution(figure: CurveFigure, x: Scale): Svg {
  const { edges, measured, regenerated, kind, coordinateUnit } = figure
  const percent = coordinateUnit === '°' ? 100 : 1
  const most = Math.max(...measured, ...regenerated) * percent
  const y: Scale = (value) => UPPER.bottom - ((value * percent) / most) * (UPPER.bottom - UPPER.top - 3)
  const outline = measured
    .map(
      (value, bin) =>
        `${bin === 0 ? `M${at(x(edges[0]), UPPER.bottom)}` : ''}V${svgNumber(y(value))}H${svgNumber(x(edges[bin + 1]))}`,
    )
    .join('')
  const line = regenerated.map((value, bin): FigurePoint => [x((edges[bin] + edges[bin + 1]) / 2), y(value)])
  const unit = kind !== 'bond' && percent === 100 ? '% per °' : `per ${coordinateUnit}`
  const { values, decimals } = niceTicks(0, most, 3)
  return [
    svgPath(`${outline}V${UPPER.bottom}Z`, { fill: data, stroke: dataEdge, 'stroke-width': 0.5 }),
    svgPath(curveLine(line), { stroke: model, 'stroke-width': 1.1, 'stroke-linejoin': 'round' }),
    leftAxis(
      values.map((value) => ({ at: y(value / percent), text: fixedWords(value, decimals) })),
      UPPER,
    ),
    label(`${italic('p')}${svgEscape(` / ${unit}`)}`, 0, UPPER.top - 7),
  ].join('')
}

function potential(figure: CurveFigure, x: Scale): Svg {
  const { limit, populated, edges, raw: rings, energyUnit } = figure
  const { coordinates, energies } = figure.potential
  const room = LOWER.bottom - LOWER.top - 3
  const y: Scale = (value) => LOWER.bottom - (Math.min(value, limit) / limit) * room
  const within = (value: number): boolean => value >= populated[0] && value <= populated[1]
  const points = coordinates.map((value, index): FigurePoint => [value, energies[index]])
  const drawn = (shown: (value: number) => boolean): string =>
    curveLine(points, { limit, shown, place: ([value, energy]) => [x(value), y(energy)] })
  const middles = rings.map((_, bin) => (edges[bin] + edges[bin + 1]) / 2)
  const stroke = { stroke: model, 'stroke-width': 1.3, 'stroke-linejoin': 'round' }
  const { values, decimals } = niceTicks(0, limit, 4)
  return [
    bandArea(figure, middles, x, y),
    svgPath(`M${at(LEFT, LOWER.bottom)}H${FIGURE.width - RIGHT}`, { stroke: plotGrid, 'stroke-width': 0.7 }),
    ...rings.map((energy, bin) =>
      energy === null || energy > limit || energy < 0
        ? ''
        : svgElement('circle', {
            cx: x(middles[bin]),
            cy: y(energy),
            r: 1.1,
            fill: 'none',
            stroke: raw,
            'stroke-width': 0.5,
          }),
    ),
    svgPath(
      drawn((value) => !within(value)),
      { ...stroke, 'stroke-dasharray': '0.5 2.2', 'stroke-linecap': 'round' },
    ),
    svgPath(drawn(within), stroke),
    leftAxis(
      values.map((value) => ({ at: y(value), text: fixedWords(value, decimals) })),
      LOWER,
    ),
    label(`${italic('U')}${svgEscape(` / ${energyUnit}`)}`, 0, LOWER.top - 6),
  ].join('')
}

/** The band about the curve, one polygon for each stretch that has one. */
function bandArea(
  { band: halves, limit, potential }: CurveFigure,
  middles: readonly number[],
  x: Scale,
  y: Scale,
): Svg {
  if (halves === null) return ''
  const stretches: number[][] = [[]]
  halves.forEach((half, bin) => {
    if (half === null) stretches.push([])
    else stretches[stretches.length - 1].push(bin)
  })
  const clamped = (value: number): number => Math.min(limit, Math.max(0, value))
  const edge = (bin: number, side: 1 | -1): string => {
    const middle = interpolated(potential.coordinates, potential.energies, middles[bin])
    return at(x(middles[bin]), y(clamped(middle + side * halves[bin]!)))
  }
  return stretches
    .filter((bins) => bins.length > 1)
    .map((bins) => {
      const upper = bins.map((bin) => edge(bin, 1))
      const lower = bins.map((bin) => edge(bin, -1)).reverse()
      return svgPath(`M${[...upper, ...lower].join('L')}Z`, { fill: band })
    })
    .join('')
}

/** The axis that both panels share, with its ticks to either side. */
function spine({ kind, shown, coordinateUnit }: CurveFigure, x: Scale): Svg {
  const { values, decimals } = niceTicks(shown[0], shown[1], 7, coordinateUnit === '°')
  const ends = (y: number, towards: number): string =>
    values.map((value) => `M${at(x(value), y)}v${towards}`).join('')
  const right = FIGURE.width - RIGHT
  return [
    svgPath(`M${at(LEFT, UPPER.bottom)}H${right}${ends(UPPER.bottom, SPINE.tick)}`, HAIR),
    ...values.map((value) =>
      label(fixedWords(value, decimals), x(value), SPINE.label, {
        'text-anchor': x(value) > right - 6 ? 'end' : 'middle',
      }),
    ),
    label(axisHead(kind, coordinateUnit), 0, SPINE.label),
  ].join('')
}

function leftAxis(
  ticks: readonly { readonly at: number; readonly text: string }[],
  panel: { top: number; bottom: number },
): Svg {
  const marks = ticks.map((tick) => `M${at(LEFT, tick.at)}h-3`).join('')
  return [
    svgPath(`M${at(LEFT, panel.top)}V${panel.bottom}${marks}`, HAIR),
    ...ticks.map((tick) => label(tick.text, LEFT - 5, tick.at + 2.6, { 'text-anchor': 'end' })),
  ].join('')
}

const at = (x: number, y: number): string => `${svgNumber(x)} ${svgNumber(y)}`
