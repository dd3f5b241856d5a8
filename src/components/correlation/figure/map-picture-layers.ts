import { MAP_RAMPS } from '@/assets/map-ramps'
import { lightTokens as token, type Svg, svgElement, svgNumber, svgPath } from '@shared/picture'
import { linePath } from '@/components/figure/line-path'
import { linearScale } from '@/components/figure/linear-scale'
import { steppedOutline, type Point } from '@/components/figure/stepped-outline'
import { BASIN_RADIUS } from './map-basins'
import type { MapCell } from './map-cells'
import type { Area, MapFrame } from './map-frame'
import type { MapMarks } from './map-marks'
import type { MapAxis, MapModel } from './map-model'
import { ALONE_TOP } from './map-option'
import type { MapView } from './map-view'

/** The map from back to front: ground, cells, contours, means, and the distributions beside it; each cut at its area. */
export function mapLayers(
  frame: MapFrame,
  model: MapModel,
  marks: MapMarks,
  cells: readonly MapCell[],
  view: MapView,
): Svg {
  return [
    ground(frame.map, view),
    cut(
      'map',
      frame.map,
      cellPaths(cells, marks, view),
      view === 'density' ? contours(model, marks) : '',
      means(model, marks),
      basinRings(model, marks),
    ),
    cut('above', frame.above, alone(model.x, frame.above, marks, 'above')),
    cut('right', frame.right, alone(model.y, frame.right, marks, 'right')),
  ].join('')
}

/** Drawn within an area only. */
function cut(name: string, { left, top, width, height }: Area, ...content: Svg[]): Svg {
  return (
    svgElement('clipPath', { id: name }, svgElement('rect', { x: left, y: top, width, height })) +
    svgElement('g', { 'clip-path': `url(#${name})` }, ...content)
  )
}

/** The colour of nothing; for the coupling stippled, since what is too thin to judge is left as ground. */
function ground({ left, top, width, height }: Area, view: MapView): Svg {
  const ramp = MAP_RAMPS.light[view]
  const area = { x: left, y: top, width, height }
  if (view === 'density') return svgElement('rect', { ...area, fill: ramp[0] })
  const dot = (at: number): Svg => svgElement('circle', { cx: at, cy: at, r: 0.8, fill: token.rule })
  return (
    svgElement(
      'pattern',
      { id: 'thin', width: 6, height: 6, patternUnits: 'userSpaceOnUse' },
      dot(1.5),
      dot(4.5),
    ) +
    svgElement('rect', { ...area, fill: ramp[(ramp.length - 1) / 2] }) +
    svgElement('rect', { ...area, fill: 'url(#thin)' })
  )
}

/** One path per colour, of rectangles on whole pixels, so that no seams show between neighbours. */
function cellPaths(cells: readonly MapCell[], { x, y }: MapMarks, view: MapView): Svg {
  const paths = new Map<number, string>()
  for (const cell of cells) {
    const [left, right] = cell.x.map((value) => Math.round(x.at(value)))
    const [bottom, top] = cell.y.map((value) => Math.round(y.at(value)))
    paths.set(cell.step, `${paths.get(cell.step) ?? ''}M${left} ${top}H${right}V${bottom}H${left}z`)
  }
  const ramp = MAP_RAMPS.light[view]
  const drawn = [...paths].map(([step, d]) => svgPath(d, { fill: ramp[step] }))
  return svgElement('g', { 'shape-rendering': 'crispEdges' }, ...drawn)
}

function contours({ contours: lines }: MapModel, { x, y }: MapMarks): Svg {
  const d = lines.map((line) => linePath(line, x, y)).join('')
  return svgPath(d, { stroke: token.ink, 'stroke-opacity': 0.42 })
}

/** The line and its bars, each cased in the plot ground so that they stand off any cell. */
function means({ mean }: MapModel, { x, y }: MapMarks): Svg {
  const line = linePath(
    mean.map((point): Point => [point.x, point.mean]),
    x,
    y,
  )
  const bars = mean
    .filter(({ half }) => half !== null)
    .map((point) => {
      const [low, high] = [-1, 1].map((side) => svgNumber(y.at(point.mean + side * point.half!)))
      return `M${svgNumber(x.at(point.x))} ${low}V${high}`
    })
    .join('')
  const stroke = (d: string, colour: string, width: number): Svg =>
    svgPath(d, { stroke: colour, 'stroke-width': width, 'stroke-linejoin': 'round' })
  return (
    stroke(bars, token.plotGround, 3.5) +
    stroke(line, token.plotGround, 4.5) +
    stroke(bars, token.ink, 1.25) +
    stroke(line, token.ink, 1.75)
  )
}

/** Numbered rings, and dashed ones where only the product has a basin. */
function basinRings({ basins }: MapModel, { x, y }: MapMarks): Svg {
  return basins
    .map((basin) => {
      const [cx, cy] = [svgNumber(x.at(basin.x)), svgNumber(y.at(basin.y))]
      const ring = (style: Record<string, string | number>): Svg =>
        svgElement('circle', { cx, cy, r: BASIN_RADIUS, ...style })
      if (basin.number === null) {
        return (
          ring({ fill: 'none', stroke: token.plotGround, 'stroke-width': 3.5 }) +
          ring({ fill: 'none', stroke: token.ink, 'stroke-width': 1.25, 'stroke-dasharray': '3 2' })
        )
      }
      const text = { x: cx, y: svgNumber(y.at(basin.y) + 4), 'text-anchor': 'middle', fill: token.ink }
      return (
        ring({ fill: token.plotGround, stroke: token.ink }) + svgElement('text', text, String(basin.number))
      )
    })
    .join('')
}

/** The stepped area of one coordinate alone; right of the map it lies on its side. */
function alone(
  axis: MapAxis,
  { left, top, width, height }: Area,
  { x, y }: MapMarks,
  place: 'above' | 'right',
): Svg {
  const outline = steppedOutline(axis.edges, axis.alone)
  const d =
    place === 'above'
      ? linePath(outline, x, linearScale([0, ALONE_TOP], [top + height, top]))
      : linePath(
          outline.map(([at, share]): Point => [share, at]),
          linearScale([0, ALONE_TOP], [left, left + width]),
          y,
        )
  return svgPath(`${d}z`, { fill: token.data }) + svgPath(d, { stroke: token.dataEdge })
}
