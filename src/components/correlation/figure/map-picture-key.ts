import type { Correlation } from '@shared/correlation'
import { MAP_RAMPS } from '@/assets/map-ramps'
import { italic, lightTokens as token, type Svg, svgElement, svgEscape, svgPath } from '@shared/picture'
import { significantText } from '@/components/figure/number-text'
import { SAMPLES_AVERAGED } from './adaptive-density'
import type { MapModel } from './map-model'
import { outsideText, scaleTicks } from './map-scale'
import type { MapView } from './map-view'

const SCALE_WIDTH = 246
const LINES_LEFT = 380
const LINE_HEIGHT = 20
const SIZE = 12.5

/** The key under the map: the colours with true values on the left, the lines on the right. */
export function mapKey(
  correlation: Correlation,
  model: MapModel,
  view: MapView,
): { body: Svg; height: number } {
  const lines = keyLines(correlation, model, view)
  return {
    body: scale(correlation, view) + meaning(correlation, model, view) + lines.map(keyLine).join(''),
    height: Math.max(3, lines.length) * LINE_HEIGHT,
  }
}

function scale(correlation: Correlation, view: MapView): Svg {
  const ramp = MAP_RAMPS.light[view]
  const step = SCALE_WIDTH / ramp.length
  const anchor = (at: number): string => (at === 0 ? 'start' : at === 1 ? 'end' : 'middle')
  return [
    ...ramp.map((fill, index) =>
      svgElement('rect', { x: index * step, y: 0, width: step + 0.6, height: 10, fill }),
    ),
    svgElement('rect', {
      x: 0.5,
      y: 0.5,
      width: SCALE_WIDTH - 1,
      height: 9.5,
      fill: 'none',
      stroke: token.edge,
    }),
    ...scaleTicks(correlation, view).map(({ at, label }) => {
      const x = at * SCALE_WIDTH
      const tick = `M${Math.min(SCALE_WIDTH - 0.5, Math.round(x) + 0.5)} 10v3`
      const text = { x, y: 26, 'text-anchor': anchor(at), fill: token.ink2 }
      return svgPath(tick, { stroke: token.plotAxis }) + svgElement('text', text, svgEscape(label))
    }),
  ].join('')
}

/** What the colours stand for. */
function meaning({ kinds }: Correlation, { highest }: MapModel, view: MapView): Svg {
  const bonds = kinds.filter((kind) => kind === 'bond').length
  const unit = ['', ' nm⁻³', ' nm⁻⁶'][bonds]
  const words =
    view === 'density'
      ? svgEscape(
          `density per volume, share of ${significantText(highest.density, 2)}${unit}, its highest value`,
        )
      : `coupling ln[${italic('p')}₁₂/(${italic('p')}₁${italic('p')}₂)] in ${italic('kT')}: − rarer, + more frequent`
  return svgElement('text', { x: 0, y: 46, 'font-size': SIZE, fill: token.ink2 }, words)
}

interface KeyLine {
  readonly swatch: Svg
  readonly words: Svg
}

function keyLine({ swatch, words }: KeyLine, index: number): Svg {
  const x = swatch === '' ? 0 : 29
  const place = `translate(${LINES_LEFT} ${index * LINE_HEIGHT})`
  const text = { x, y: 10.5, 'font-size': SIZE, fill: swatch === '' ? token.ink3 : token.ink2 }
  return svgElement('g', { transform: place }, swatch, svgElement('text', text, words))
}

function keyLines(correlation: Correlation, model: MapModel, view: MapView): KeyLine[] {
  const hasBars = model.mean.some(({ half }) => half !== null)
  const bars = hasBars ? ', 95 %' : ', no bars: sample size not stated'
  const mean = {
    swatch:
      svgPath('M1 9 21 3', { stroke: token.ink, 'stroke-width': 1.75 }) +
      (hasBars ? svgPath('M11 1v10', { stroke: token.ink, 'stroke-width': 1.25 }) : ''),
    words: `mean ${italic(model.y.names.symbol)} at each ${italic(model.x.names.symbol)}${svgEscape(bars)}`,
  }
  const contour = {
    swatch: svgPath('M1 10C5 0 15 0 21 9', { stroke: token.ink, 'stroke-opacity': 0.42 }),
    words: `1, 2, 3 ${italic('kT')} above the lowest, averaged`,
  }
  const outside = outsideText(correlation, model)
  const remark = (words: string): KeyLine => ({ swatch: '', words: svgEscape(words) })
  return [
    mean,
    view === 'density' ? contour : { swatch: thinSwatch(), words: 'too thin to judge' },
    ...basinLines(model),
    ...(view === 'density' && model.averaged
      ? [remark(`thin cells averaged until they hold ${SAMPLES_AVERAGED} independent samples`)]
      : []),
    ...(outside === null ? [] : [remark(outside)]),
  ]
}

function basinLines({ basins }: MapModel): KeyLine[] {
  const ring = (dash: string): Svg =>
    svgElement('circle', {
      cx: 11,
      cy: 6,
      r: 6,
      fill: token.plotGround,
      stroke: token.ink,
      'stroke-dasharray': dash,
    })
  return [
    ...(basins.length > 0 ? [{ swatch: ring('none'), words: 'basin of the map' }] : []),
    ...(basins.some(({ number }) => number === null)
      ? [{ swatch: ring('3 2'), words: 'basin of the product only' }]
      : []),
  ]
}

function thinSwatch(): Svg {
  const dot = (cx: number, cy: number): Svg => svgElement('circle', { cx, cy, r: 0.9, fill: token.ink3 })
  return [
    svgElement('rect', { x: 0.5, y: 0.5, width: 21, height: 11, fill: token.plotGround, stroke: token.rule }),
    ...[3, 8, 13, 18].map((x) => dot(x, 3.5)),
    ...[5.5, 10.5, 15.5].map((x) => dot(x, 8)),
  ].join('')
}
