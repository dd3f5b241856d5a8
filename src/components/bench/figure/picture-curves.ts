import { lightTokens as token } from '@/components/figure/light-tokens'
import { linePath } from '@/components/figure/line-path'
import type { LinearScale } from '@/components/figure/linear-scale'
import type { Point } from '@/components/figure/stepped-outline'
import { svgElement, svgPath, type Svg, type SvgAttributes } from '@/components/figure/svg-writer'
import type { AxisMarks } from './axis-marks'
import type { FigureFrame, Panel } from './figure-frame'
import type { FigureModel } from './figure-model'
import { RING_RADIUS, SMOOTH_OPACITY, type VisibleCurves } from './panel-option'
import { residualStems, stemPath } from './residual-stems'
import { ringPath } from './ring-path'

/** The curves of the bench figure in drawing order, each cut at its panel; what the key has switched off is left out. */
export function pictureCurves(
  frame: FigureFrame,
  model: FigureModel,
  marks: AxisMarks,
  visible: VisibleCurves,
): Svg {
  return [
    cut('distribution', frame.distribution, distributionCurves(model, marks, visible)),
    frame.residual === null ? '' : cut('residual', frame.residual, stems(model, marks)),
    cut('potential', frame.potential, potentialCurves(model, marks, visible)),
  ].join('')
}

/** Drawn within a panel only. */
function cut(name: string, { left, top, width, height }: Panel, content: Svg): Svg {
  return (
    svgElement('clipPath', { id: name }, svgElement('rect', { x: left, y: top, width, height })) +
    svgElement('g', { 'clip-path': `url(#${name})` }, content)
  )
}

function distributionCurves(model: FigureModel, { x, density }: AxisMarks, visible: VisibleCurves): Svg {
  const outline = linePath(model.measured, x, density)
  return [
    visible.measured
      ? svgPath(`${outline}z`, { fill: token.data }) + svgPath(outline, { stroke: token.dataEdge })
      : '',
    visible.regenerated
      ? curve(model.regenerated, x, density, { stroke: token.model, 'stroke-width': 1.5 })
      : '',
  ].join('')
}

function stems({ bins }: FigureModel, { x, residual }: AxisMarks): Svg {
  if (residual === null || bins.residuals === null) return ''
  const path = stemPath(residualStems(bins.midpoints, bins.residuals, x, residual))
  return svgPath(path, { stroke: token.dataEdge, 'stroke-width': 1.5 })
}

function potentialCurves(model: FigureModel, { x, energy }: AxisMarks, visible: VisibleCurves): Svg {
  const plain = { stroke: token.plain, 'stroke-width': 1.25, 'stroke-dasharray': '5 3.5' }
  const faint = { stroke: token.model, 'stroke-width': 1.25, 'stroke-opacity': SMOOTH_OPACITY }
  const dots = { stroke: token.model, 'stroke-width': 1.5, 'stroke-dasharray': '2 3.5' }
  const centres = model.rings.map(([across, up]) => [x.at(across), energy.at(up)])
  const band = (model.band ?? []).map((polygon) =>
    svgPath(`${linePath(polygon, x, energy)}z`, { fill: token.band }),
  )
  return [
    ...(visible.potential ? band : []),
    visible.comparison && model.comparison ? curve(model.comparison, x, energy, plain) : '',
    visible.rings
      ? svgPath(ringPath(centres, RING_RADIUS), { fill: token.plotGround, stroke: token.raw })
      : '',
    visible.smooth && model.smooth ? curve(model.smooth, x, energy, faint) : '',
    visible.potential ? curve(model.potential, x, energy, { stroke: token.model, 'stroke-width': 1.75 }) : '',
    ...(visible.potential ? model.tails.map((tail) => curve(tail, x, energy, dots)) : []),
  ].join('')
}

function curve(points: readonly Point[], x: LinearScale, y: LinearScale, style: SvgAttributes): Svg {
  return svgPath(linePath(points, x, y), { 'stroke-linecap': 'round', 'stroke-linejoin': 'round', ...style })
}
