import type { lightTokens } from '@shared/picture'
import { linePath } from '@/components/figure/line-path'
import type { LinearScale } from '@/components/figure/linear-scale'
import type { Point } from '@/components/figure/stepped-outline'
import type { AxisMarks } from './axis-marks'
import type { FigureModel } from './figure-model'
import { residualStems, stemPath } from './residual-stems'
import { ringPath } from './ring-path'
import type { VisibleCurves } from './visible-curves'

/** Name of a colour: the screen reads it as a CSS variable, a picture from the light tokens. */
type Token = keyof typeof lightTokens

/** One path of the figure in pixels, with its pen. */
export interface CurvePath {
  /** Steady while the figure changes, so that a curve is changed in place. */
  readonly key: string
  readonly d: string
  readonly fill: Token | null
  readonly stroke: Token | null
  readonly width: number
  readonly dash: string | null
  readonly opacity: number | null
  /** A smooth curve: round ends and joins. */
  readonly round: boolean
}

/** The paths of each panel, from back to front. */
export interface CurvePaths {
  readonly distribution: readonly CurvePath[]
  readonly residual: readonly CurvePath[]
  readonly potential: readonly CurvePath[]
}

/** Radius of a bin by bin point, in pixels. */
const RING_RADIUS = 2.1
/** The smooth curve stays in sight behind a form, but faint. */
export const SMOOTH_OPACITY = 0.55

/** Everything the bench figure draws inside its panels: the one source of the screen and of a picture. */
export function curvePaths(model: FigureModel, marks: AxisMarks, visible: VisibleCurves): CurvePaths {
  return {
    distribution: distributionPaths(model, marks, visible),
    residual: visible.residual ? residualPaths(model, marks) : [],
    potential: potentialPaths(model, marks, visible),
  }
}

function distributionPaths(
  model: FigureModel,
  { x, density }: AxisMarks,
  visible: VisibleCurves,
): CurvePath[] {
  const outline = linePath(model.measured, x, density)
  return [
    ...(visible.measured
      ? [path('measured', `${outline}z`, { fill: 'data' }), path('outline', outline, { stroke: 'dataEdge' })]
      : []),
    ...(visible.regenerated
      ? [curve('regenerated', model.regenerated, x, density, { stroke: 'model', width: 1.5 })]
      : []),
  ]
}

function residualPaths({ bins }: FigureModel, { x, residual }: AxisMarks): CurvePath[] {
  if (residual === null || bins.residuals === null) return []
  const stems = stemPath(residualStems(bins.midpoints, bins.residuals, x, residual))
  return [path('stems', stems, { stroke: 'dataEdge', width: 1.5 })]
}

function potentialPaths(model: FigureModel, { x, energy }: AxisMarks, visible: VisibleCurves): CurvePath[] {
  const paths: CurvePath[] = []
  if (visible.potential) {
    model.band?.forEach((polygon, index) => {
      paths.push(path(`band ${index}`, `${linePath(polygon, x, energy)}z`, { fill: 'band' }))
    })
  }
  if (visible.comparison && model.comparison) {
    const pen: Pen = { stroke: 'plain', width: 1.25, dash: '5 3.5' }
    paths.push(curve('comparison', model.comparison, x, energy, pen))
  }
  if (visible.rings) {
    const centres = model.rings.map(([across, up]) => [x.at(across), energy.at(up)])
    paths.push(path('rings', ringPath(centres, RING_RADIUS), { fill: 'plotGround', stroke: 'raw' }))
  }
  if (visible.smooth && model.smooth) {
    const pen: Pen = { stroke: 'model', width: 1.25, opacity: SMOOTH_OPACITY }
    paths.push(curve('smooth', model.smooth, x, energy, pen))
  }
  if (visible.potential) {
    paths.push(curve('potential', model.potential, x, energy, { stroke: 'model', width: 1.75 }))
    model.tails.forEach((tail, index) => {
      paths.push(curve(`tail ${index}`, tail, x, energy, { stroke: 'model', width: 1.5, dash: '2 3.5' }))
    })
  }
  return paths
}

type Pen = Partial<Omit<CurvePath, 'key' | 'd'>>

function path(key: string, d: string, pen: Pen): CurvePath {
  return { key, d, fill: null, stroke: null, width: 1, dash: null, opacity: null, round: false, ...pen }
}

function curve(key: string, points: readonly Point[], x: LinearScale, y: LinearScale, pen: Pen): CurvePath {
  return path(key, linePath(points, x, y), { ...pen, round: true })
}
