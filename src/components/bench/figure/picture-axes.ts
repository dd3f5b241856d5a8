import {
  italic,
  lightTokens as token,
  type Svg,
  type SvgAttributes,
  svgElement,
  svgEscape,
  svgPath,
} from '@shared/picture'
import type { AxisMarks, Mark } from './axis-marks'
import type { EmptyBrackets } from './empty-brackets'
import type { FigureFrame, Panel } from './figure-frame'
import type { FigureAxes } from './figure-model'

/** Frame, ticks, names and units of the bench figure, and the bins without counts: what lies over the curves. */
export function pictureAxes(
  frame: FigureFrame,
  axes: FigureAxes,
  marks: AxisMarks,
  empty: EmptyBrackets,
): Svg {
  return [
    lines(frame),
    spine(frame, axes, marks),
    ...[...marks.densityTicks, ...marks.residualTicks, ...marks.energyTicks].map((mark) =>
      leftTick(frame, mark),
    ),
    ...marks.secondTicks.map((mark) => rightTick(frame, mark)),
    ...axisNames(frame, axes),
    emptyBins(frame, empty),
  ].join('')
}

/** What lies under the curves: the grounds of the panels and the zero lines. */
export function pictureGrounds(frame: FigureFrame, marks: AxisMarks): Svg {
  const { distribution, residual, potential } = frame
  const right = distribution.left + distribution.width
  const across = (at: number, stroke: string): Svg =>
    svgPath(`M${potential.left} ${half(at)}H${right}`, { stroke })
  return [
    ...[distribution, ...(residual ? [residual] : []), potential].map(ground),
    across(marks.energy.at(0), token.plotGrid),
    ...marks.residualTicks.map(({ at }) => across(at, token.rule)),
    marks.residual === null ? '' : across(marks.residual.at(0), token.plotGrid),
  ].join('')
}

/** Lines of one pixel lie on half pixels. */
const half = (pixel: number): number => Math.round(pixel - 0.5) + 0.5

const ground = ({ left, top, width, height }: Panel): Svg =>
  svgElement('rect', { x: left, y: top, width, height, fill: token.plotGround })

const axis = (d: string): Svg => svgPath(d, { stroke: token.plotAxis })

/** Text in the ink of names (quantities) or, as a rule, of labels (numbers and units). */
function text(
  x: number,
  y: number,
  anchor: 'start' | 'middle' | 'end',
  content: Svg,
  more: SvgAttributes = {},
): Svg {
  return svgElement(
    'text',
    { x, y, 'text-anchor': anchor === 'start' ? null : anchor, fill: token.ink2, ...more },
    content,
  )
}
const NAME = { fill: token.ink } as const

function lines({ distribution, residual, potential, spineTop }: FigureFrame): Svg {
  const { left, top, width, height } = distribution
  const right = left + width
  const base = top + height
  const floor = potential.top + potential.height
  const strip = residual
    ? `M${left - 0.5} ${residual.top}V${spineTop}M${left - 1} ${spineTop + 0.5}H${right + 1}`
    : ''
  return (
    svgPath(`M${left} ${floor + 0.5}H${right}`, { stroke: token.rule }) +
    axis(
      `M${left - 0.5} ${top}V${base}M${left - 0.5} ${potential.top}V${floor}M${right + 0.5} ${potential.top}V${floor}` +
        `M${left - 1} ${base + 0.5}H${right + 1}M${left - 1} ${potential.top - 0.5}H${right + 1}${strip}`,
    )
  )
}

function spine(frame: FigureFrame, { names }: FigureAxes, { spine: { major, minor } }: AxisMarks): Svg {
  const { spineTop, potential, labelBaseline } = frame
  const ticks = (marks: readonly Mark[], length: number): string =>
    marks
      .map(({ at }) => `M${half(at)} ${spineTop}v${length}M${half(at)} ${potential.top}v${-length}`)
      .join('')
  const right = potential.left + potential.width
  return (
    axis(ticks(major, 5) + ticks(minor, 3)) +
    major
      .filter(({ label }) => label !== null)
      .map(({ at, label }) => text(half(at), labelBaseline, 'middle', svgEscape(label!)))
      .join('') +
    text(
      right + 20,
      labelBaseline,
      'start',
      `${italic(names.symbol)}${svgEscape(`, ${names.axisUnit}`)}`,
      NAME,
    )
  )
}

function leftTick({ distribution: { left } }: FigureFrame, { at, label }: Mark): Svg {
  const tick = axis(`M${left} ${half(at)}h-5`)
  return label === null ? tick : tick + text(left - 8, half(at) + 4, 'end', svgEscape(label))
}

function rightTick({ potential: { left, width } }: FigureFrame, { at, label }: Mark): Svg {
  return (
    axis(`M${left + width} ${half(at)}h5`) +
    text(left + width + 9, half(at) + 4, 'start', svgEscape(label ?? ''))
  )
}

/** Quantity over unit at the head of each axis. */
function axisNames({ distribution, residual, potential }: FigureFrame, axes: FigureAxes): Svg[] {
  const { names, energyUnit, secondEnergy } = axes
  const end = distribution.left - 8
  const start = distribution.left + distribution.width + 9
  const unit = (name: string): Svg => (name === 'kT' ? italic(name) : svgEscape(name))
  const of = (quantity: string): Svg => `${italic(quantity)}(${italic(names.symbol)})`
  return [
    text(end, distribution.top + 9, 'end', of('p'), NAME),
    text(end, distribution.top + 23, 'end', svgEscape(names.densityUnit)),
    text(end, potential.top + 9, 'end', of('U'), NAME),
    text(end, potential.top + 23, 'end', unit(energyUnit)),
    text(start, potential.top + 9, 'start', unit(secondEnergy.unit)),
    ...(residual
      ? [
          text(start, residual.top + 19, 'start', 'residual', NAME),
          text(start, residual.top + 33, 'start', `in ${italic('σ')}`),
        ]
      : []),
  ]
}

function emptyBins({ distribution }: FigureFrame, { brackets, labelAt }: EmptyBrackets): Svg {
  const base = distribution.top + distribution.height
  const open = brackets
    .map(({ from, to }) => `M${from.toFixed(2)} ${base - 0.5}v-4H${to.toFixed(2)}v4`)
    .join('')
  return (
    svgPath(open, { stroke: token.ink3, 'stroke-width': 0.9 }) +
    (labelAt === null ? '' : text(labelAt, base - 11, 'middle', 'no counts', { fill: token.ink3 }))
  )
}
