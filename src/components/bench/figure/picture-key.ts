import {
  italic,
  lightTokens as token,
  type Svg,
  svgElement,
  svgEscape,
  svgPath,
  textWidth,
} from '@shared/picture'
import { SMOOTH_OPACITY } from './curve-paths'
import type { FigureModel } from './figure-model'
import { CURVES, type CurveName, type VisibleCurves } from './visible-curves'
import { ringPath } from './ring-path'

/** An entry of the key: its swatch in a field of 22 × 12, and its words plain (for their width) and set. */
interface Entry {
  readonly swatch: Svg
  readonly plain: string
  readonly words: Svg
}

const SWATCH = 29
const GAP = 20
const LINE_HEIGHT = 20
const SIZE = 12.5

/**
 * The key of the bench figure in drawing order, in as many lines as it needs; without what is switched off.
 *
 * @param jacobian whether the inversion divides by the Jacobian: the comparison shows the other way
 */
export function pictureKey(
  model: FigureModel,
  visible: VisibleCurves,
  jacobian: boolean,
  width: number,
): { body: Svg; height: number } {
  let x = 0
  let line = 0
  const body: Svg[] = []
  for (const name of CURVES) {
    const entry = visible[name] ? entryOf(name, model, jacobian) : null
    if (entry === null) continue
    const wide = SWATCH + textWidth(entry.plain, SIZE)
    if (x > 0 && x + wide > width) {
      x = 0
      line += 1
    }
    const place = `translate(${x.toFixed(1)} ${line * LINE_HEIGHT})`
    const words = svgElement('text', { x: SWATCH, y: 10.5, 'font-size': SIZE, fill: token.ink2 }, entry.words)
    body.push(svgElement('g', { transform: place }, entry.swatch, words))
    x += wide + GAP
  }
  return { body: body.join(''), height: (line + 1) * LINE_HEIGHT }
}

function entryOf(name: CurveName, model: FigureModel, jacobian: boolean): Entry | null {
  const named = (swatch: Svg, plain: string): Entry => ({ swatch, plain, words: svgEscape(plain) })
  if (name === 'measured') return named(measuredSwatch(), 'measured')
  if (name === 'regenerated') {
    const swatch = svgPath('M1 9C7 9 8 3 12 3s5 5 9 6', { stroke: token.model, 'stroke-width': 1.5 })
    return { swatch, plain: 'regenerated from U', words: `regenerated from ${italic('U')}` }
  }
  if (name === 'residual') {
    if (model.bins.residuals === null) return null
    return named(residualSwatch(), 'residual')
  }
  if (name === 'potential') return potentialEntry(model.band !== null)
  if (name === 'smooth') {
    if (model.smooth === null) return null
    return named(
      svgPath('M1 8C7 8 9 4 12 4s6 3 9 3', {
        stroke: token.model,
        'stroke-width': 1.25,
        'stroke-opacity': SMOOTH_OPACITY,
      }),
      'smooth curve',
    )
  }
  if (name === 'rings') {
    const centres = [
      [6, 8],
      [15, 4],
    ]
    return named(svgPath(ringPath(centres, 2.1), { fill: token.plotGround, stroke: token.raw }), 'bin by bin')
  }
  return comparisonEntry(model, jacobian)
}

function measuredSwatch(): Svg {
  return (
    svgPath('M1 12V6h5V2h6v3h5v7z', { fill: token.data }) +
    svgPath('M1 12V6.5h5.5V2.5h5V5.5h5.5V12', { stroke: token.dataEdge })
  )
}

function residualSwatch(): Svg {
  return (
    svgPath('M1 1.5h20M1 10.5h20', { stroke: token.rule }) +
    svgPath('M4 6V3M8.5 6V9M13 6V1M17.5 6V8', { stroke: token.dataEdge, 'stroke-width': 1.5 })
  )
}

function potentialEntry(hasBand: boolean): Entry {
  const words = hasBand ? ', 95 % band' : ', no band: sample size not stated'
  const line = svgPath('M1 6h20', { stroke: token.model, 'stroke-width': 1.75 })
  return {
    swatch: hasBand ? svgPath('M1 1h20v10H1z', { fill: token.band }) + line : line,
    plain: `U${words}`,
    words: italic('U') + svgEscape(words),
  }
}

function comparisonEntry({ names: { jacobian }, comparison }: FigureModel, divided: boolean): Entry | null {
  if (jacobian === null || comparison === null) return null
  const before = `${divided ? 'without' : 'with'} ${jacobian.before}`
  return {
    swatch: svgPath('M1 6h21', { stroke: token.plain, 'stroke-width': 1.25, 'stroke-dasharray': '5 3.5' }),
    plain: before + jacobian.symbol + jacobian.after,
    words: svgEscape(before) + italic(jacobian.symbol) + svgEscape(jacobian.after),
  }
}
