import type { CustomSeriesOption, LineSeriesOption } from 'echarts/charts'
import type { Point } from '@/components/figure/stepped-outline'
import type { CurveChartOption } from '@/plugins/echarts'
import type { FigureFrame, Panel } from './figure-frame'
import type { FigureAxes, FigureModel } from './figure-model'
import { ringPath } from './ring-path'

/** Curves that the key can switch off, in drawing order. */
export const CURVES = [
  'measured',
  'regenerated',
  'residual',
  'potential',
  'smooth',
  'rings',
  'comparison',
] as const
export type CurveName = (typeof CURVES)[number]
export type VisibleCurves = Readonly<Record<CurveName, boolean>>

/** From back to front. */
const LAYERS = [
  'measured',
  'regenerated',
  'band',
  'comparison',
  'rings',
  'smooth',
  'potential',
  'tail',
] as const
type Layer = (typeof LAYERS)[number]

/** Radius of a bin by bin point, in pixels. */
export const RING_RADIUS = 2.1
/** The smooth curve stays in sight behind a form, but faint. */
export const SMOOTH_OPACITY = 0.55
const DISTRIBUTION = 0
const POTENTIAL = 1

/** Colours are the page's tokens as CSS variables, so that a change of theme needs no redraw. */
const token = (name: string): string => `var(--${name})`

type Series = LineSeriesOption | CustomSeriesOption

/**
 * The two panels for the chart library: same shared axis, axes themselves undrawn (the spine and the margins are drawn over
 * it to the pixel). Without a model the panels stay empty.
 */
export function panelOption(
  frame: FigureFrame,
  axes: FigureAxes,
  model: FigureModel | null,
  visible: VisibleCurves,
): CurveChartOption {
  const hidden = { show: false, type: 'value', scale: false } as const
  const [low, high] = axes.domain
  return {
    animation: false,
    grid: [grid(frame.distribution), grid(frame.potential)],
    xAxis: [DISTRIBUTION, POTENTIAL].map((gridIndex) => ({ ...hidden, gridIndex, min: low, max: high })),
    yAxis: [
      { ...hidden, gridIndex: DISTRIBUTION, min: 0, max: axes.densityTop },
      { ...hidden, gridIndex: POTENTIAL, min: axes.energyDomain[0], max: axes.energyDomain[1] },
    ],
    series: model === null ? [] : curves(model, visible),
  }
}

const grid = ({ left, top, width, height }: Panel) => ({
  left,
  top,
  width,
  height,
  outerBoundsMode: 'none' as const,
})

/** The curves in drawing order. */
function curves(model: FigureModel, visible: VisibleCurves): Series[] {
  const series: Series[] = []
  if (visible.measured) series.push(measured(model.measured))
  if (visible.regenerated) {
    series.push(line('regenerated', DISTRIBUTION, model.regenerated, { color: token('model'), width: 1.5 }))
  }
  if (visible.potential) model.band?.forEach((polygon, index) => series.push(band(polygon, index)))
  if (visible.comparison && model.comparison) {
    const style = { color: token('plain'), width: 1.25, type: [5, 3.5] }
    series.push(line('comparison', POTENTIAL, model.comparison, style))
  }
  if (visible.rings) series.push(rings(model.rings))
  if (visible.smooth && model.smooth) {
    const style = { color: token('model'), width: 1.25, opacity: SMOOTH_OPACITY }
    series.push(line('smooth', POTENTIAL, model.smooth, style))
  }
  if (visible.potential) {
    const style = { color: token('model'), width: 1.75 }
    const dots = { color: token('model'), width: 1.5, type: [2, 3.5] }
    series.push(line('potential', POTENTIAL, model.potential, style))
    model.tails.forEach((tail, index) => series.push(line('tail', POTENTIAL, tail, dots, index)))
  }
  return series
}

function line(
  layer: Layer,
  panel: number,
  points: readonly Point[],
  style: NonNullable<LineSeriesOption['lineStyle']>,
  index = 0,
): LineSeriesOption {
  return {
    ...shared(layer, panel, index),
    type: 'line',
    data: points.map((point) => [...point]),
    showSymbol: false,
    emphasis: { disabled: true },
    lineStyle: { cap: 'round', join: 'round', ...style },
  }
}

/** What every series says. A steady id lets the library change a curve in place; the layer keeps the drawing order. */
const shared = (layer: Layer, panel: number, index = 0) =>
  ({
    id: `${layer} ${index}`,
    name: layer,
    z: LAYERS.indexOf(layer),
    xAxisIndex: panel,
    yAxisIndex: panel,
    silent: true,
    clip: true,
  }) as const

/** Stepped area and its outline. */
function measured(outline: readonly Point[]): CustomSeriesOption {
  return {
    ...shared('measured', DISTRIBUTION),
    type: 'custom',
    data: [[outline[0][0], 0]],
    renderItem: (_, api) => {
      const points = outline.map((point) => api.coord([...point]))
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

function band(polygon: readonly Point[], index: number): CustomSeriesOption {
  return {
    ...shared('band', POTENTIAL, index),
    type: 'custom',
    data: [[...polygon[0]]],
    renderItem: (_, api) => ({
      type: 'polygon',
      shape: { points: polygon.map((point) => api.coord([...point])) },
      style: { fill: token('band') },
    }),
  }
}

function rings(points: readonly Point[]): CustomSeriesOption {
  return {
    ...shared('rings', POTENTIAL),
    type: 'custom',
    data: [[...points[0]]],
    renderItem: (_, api) => {
      const centres = points.map((point) => api.coord([...point]))
      const style = { fill: token('plotGround'), stroke: token('raw'), lineWidth: 1 }
      return { type: 'path', shape: { pathData: ringPath(centres, RING_RADIUS) }, style }
    },
  }
}
