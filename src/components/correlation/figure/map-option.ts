import type { CustomSeriesOption } from 'echarts/charts'
import { steppedOutline } from '@/components/figure/stepped-outline'
import type { CurveChartOption } from '@/plugins/echarts'
import type { MapCell } from './map-cells'
import type { Area, MapFrame } from './map-frame'
import type { MapAxis, MapModel } from './map-model'

const MAP = 0
const ABOVE = 1
const RIGHT = 2

/** Head room above the highest bin of a distribution alone. */
export const ALONE_TOP = 1.04

/** Colours are the page's tokens as CSS variables; only the cells take theirs from a ramp. */
const token = (name: string): string => `var(--${name})`

/**
 * The map and the two distributions beside it for the chart library. Axes are not drawn here: they lie over it to the
 * pixel.
 *
 * @param ramp colours the cells' steps refer to
 * @param contours whether lines of equal free energy are drawn
 */
export function mapOption(
  frame: MapFrame,
  model: MapModel,
  cells: readonly MapCell[],
  ramp: readonly string[],
  contours: boolean,
): CurveChartOption {
  const hidden = { show: false, type: 'value', scale: false } as const
  const x = { ...hidden, min: model.x.window[0], max: model.x.window[1] }
  const y = { ...hidden, min: model.y.window[0], max: model.y.window[1] }
  const alone = { ...hidden, min: 0, max: ALONE_TOP }
  return {
    animation: false,
    grid: [grid(frame.map), grid(frame.above), grid(frame.right)],
    xAxis: [
      { ...x, gridIndex: MAP },
      { ...x, gridIndex: ABOVE },
      { ...alone, gridIndex: RIGHT },
    ],
    yAxis: [
      { ...y, gridIndex: MAP },
      { ...alone, gridIndex: ABOVE },
      { ...y, gridIndex: RIGHT },
    ],
    series: [
      cellSeries(cells, ramp),
      ...(contours ? [contourSeries(model)] : []),
      meanSeries(model),
      aloneSeries(model.x, ABOVE),
      aloneSeries(model.y, RIGHT),
    ],
  }
}

const grid = ({ left, top, width, height }: Area) => ({
  left,
  top,
  width,
  height,
  outerBoundsMode: 'none' as const,
})

const shared = (name: string, place: number) =>
  ({
    name,
    xAxisIndex: place,
    yAxisIndex: place,
    silent: true,
    clip: true,
  }) as const

/** Rectangles on whole pixels, so that no seams show between neighbours. */
function cellSeries(cells: readonly MapCell[], ramp: readonly string[]): CustomSeriesOption {
  return {
    ...shared('cells', MAP),
    type: 'custom',
    data: cells.map(({ x, y, step }) => [x[0], y[0], x[1], y[1], step]),
    encode: { x: [0, 2], y: [1, 3] },
    renderItem: (_, api) => {
      const [left, bottom] = api.coord([api.value(0), api.value(1)]).map(Math.round)
      const [right, top] = api.coord([api.value(2), api.value(3)]).map(Math.round)
      const shape = { x: left, y: top, width: right - left, height: bottom - top }
      return { type: 'rect', shape, style: { fill: ramp[Number(api.value(4))] } }
    },
  }
}

function contourSeries({ contours, x, y }: MapModel): CustomSeriesOption {
  return {
    ...shared('contours', MAP),
    type: 'custom',
    data: [[x.window[0], y.window[0]]],
    renderItem: (_, api) => ({
      type: 'group',
      children: contours.map((line) => ({
        type: 'polyline',
        shape: { points: line.map((point) => api.coord([...point])) },
        style: { fill: 'none', stroke: token('ink'), opacity: 0.42, lineWidth: 1 },
      })),
    }),
  }
}

/** The line and its bars, each cased in the plot ground so that they stand off any cell. */
function meanSeries({ mean, x, y }: MapModel): CustomSeriesOption {
  return {
    ...shared('mean', MAP),
    type: 'custom',
    data: [[x.window[0], y.window[0]]],
    renderItem: (_, api) => {
      const points = mean.map((point) => api.coord([point.x, point.mean]))
      const bars = mean
        .filter(({ half }) => half !== null)
        .map((point) => {
          const [x1, y1] = api.coord([point.x, point.mean - point.half!])
          const [x2, y2] = api.coord([point.x, point.mean + point.half!])
          return { x1, y1, x2, y2 }
        })
      const stroke = (name: string, lineWidth: number) => ({
        fill: 'none',
        stroke: token(name),
        lineWidth,
        lineJoin: 'round' as const,
      })
      const bar = (name: string, lineWidth: number) =>
        bars.map((shape) => ({ type: 'line' as const, shape, style: stroke(name, lineWidth) }))
      return {
        type: 'group',
        children: [
          ...bar('plotGround', 3.5),
          { type: 'polyline', shape: { points }, style: stroke('plotGround', 4.5) },
          ...bar('ink', 1.25),
          { type: 'polyline', shape: { points }, style: stroke('ink', 1.75) },
        ],
      }
    },
  }
}

/** The stepped area of one coordinate alone; right of the map it lies on its side. */
function aloneSeries(axis: MapAxis, place: typeof ABOVE | typeof RIGHT): CustomSeriesOption {
  const outline = steppedOutline(axis.edges, axis.alone)
  return {
    ...shared('alone', place),
    type: 'custom',
    data: [place === ABOVE ? [axis.window[0], 0] : [0, axis.window[0]]],
    renderItem: (_, api) => {
      const points = outline.map(([at, height]) => api.coord(place === ABOVE ? [at, height] : [height, at]))
      const edge = { fill: 'none', stroke: token('dataEdge'), lineWidth: 1, lineJoin: 'miter' as const }
      return {
        type: 'group',
        children: [
          { type: 'polygon', shape: { points }, style: { fill: token('data') } },
          { type: 'polyline', shape: { points }, style: edge },
        ],
      }
    },
  }
}
