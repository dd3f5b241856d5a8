import { lightTokens, type Svg, svgElement, svgPath } from '@shared/picture'
import type { AxisMarks } from './axis-marks'
import { type CurvePath, curvePaths } from './curve-paths'
import type { FigureFrame, Panel } from './figure-frame'
import type { FigureModel } from './figure-model'
import type { VisibleCurves } from './visible-curves'

/** The curves of the bench figure in drawing order, each cut at its panel; what the key has switched off is left out. */
export function pictureCurves(
  frame: FigureFrame,
  model: FigureModel,
  marks: AxisMarks,
  visible: VisibleCurves,
): Svg {
  const { distribution, residual, potential } = curvePaths(model, marks, visible)
  return [
    cut('distribution', frame.distribution, distribution),
    frame.residual === null ? '' : cut('residual', frame.residual, residual),
    cut('potential', frame.potential, potential),
  ].join('')
}

/** Drawn within a panel only. */
function cut(name: string, { left, top, width, height }: Panel, paths: readonly CurvePath[]): Svg {
  return (
    svgElement('clipPath', { id: name }, svgElement('rect', { x: left, y: top, width, height })) +
    svgElement('g', { 'clip-path': `url(#${name})` }, ...paths.map(drawn))
  )
}

function drawn({ d, fill, stroke, width, dash, opacity, round }: CurvePath): Svg {
  return svgPath(d, {
    fill: fill === null ? 'none' : lightTokens[fill],
    stroke: stroke && lightTokens[stroke],
    'stroke-width': stroke && width,
    'stroke-dasharray': dash,
    'stroke-opacity': opacity,
    'stroke-linecap': round ? 'round' : null,
    'stroke-linejoin': round ? 'round' : null,
  })
}
