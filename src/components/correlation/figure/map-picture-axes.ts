import { italic, lightTokens as token, type Svg, svgElement, svgEscape, svgPath } from '@shared/picture'
import type { PairNames } from '../verdict-words'
import type { MapFrame } from './map-frame'
import type { MapMarks } from './map-marks'
import type { MapModel } from './map-model'

/** Frame, ticks, names and units of the map and of the two distributions beside it. */
export function mapAxes(frame: MapFrame, model: MapModel, marks: MapMarks, names: PairNames): Svg {
  return lines(frame) + ticks(frame, marks) + axisNames(frame, model, names)
}

const axis = (d: string): Svg => svgPath(d, { stroke: token.plotAxis })

function text(x: number, y: number, anchor: 'start' | 'middle' | 'end', fill: string, content: Svg): Svg {
  return svgElement('text', { x, y, 'text-anchor': anchor, fill }, content)
}

function lines({ map, above, right: beside }: MapFrame): Svg {
  const right = map.left + map.width
  const floor = map.top + map.height
  return (
    svgPath(`M${map.left} ${map.top - 0.5}H${right + 0.5}V${floor}`, { stroke: token.rule }) +
    axis(
      `M${map.left - 0.5} ${map.top}V${floor + 0.5}H${right}` +
        `M${map.left} ${above.top + above.height + 0.5}H${right}M${beside.left - 0.5} ${map.top}V${floor}`,
    )
  )
}

function ticks({ map }: MapFrame, { xTicks, yTicks }: MapMarks): Svg {
  const floor = map.top + map.height
  return [
    axis(
      xTicks.map(({ at }) => `M${at} ${floor}v5`).join('') +
        yTicks.map(({ at }) => `M${map.left} ${at}h-5`).join(''),
    ),
    ...xTicks
      .filter(({ label }) => label !== null)
      .map(({ at, label }) => text(at, floor + 19, 'middle', token.ink2, svgEscape(label!))),
    ...yTicks.map(({ at, label }) => text(map.left - 8, at + 4, 'end', token.ink2, svgEscape(label ?? ''))),
  ].join('')
}

function axisNames({ map, above, right: beside }: MapFrame, { x, y }: MapModel, names: PairNames): Svg {
  const right = map.left + map.width
  const across = `${italic(x.names.symbol)}${svgEscape(`(${names[0]}), ${x.names.axisUnit}`)}`
  return [
    text(right, map.top + map.height + 19, 'end', token.ink, across),
    text(map.left - 8, map.top - 24, 'end', token.ink, italic(y.names.symbol)),
    text(map.left - 8, map.top - 10, 'end', token.ink2, svgEscape(y.names.axisUnit)),
    text(map.left + 8, above.top + 12, 'start', token.ink3, svgEscape(`${names[0]} alone`)),
    text(beside.left + beside.width, map.top - 10, 'end', token.ink3, svgEscape(`${names[1]} alone`)),
  ].join('')
}
