import { sheetSvg } from '../../../shared/data-sheet'
import { lightTokens, type Svg, svgElement, svgPath } from '../../../shared/picture'

/** The bead of the mark, which is what a person can do elsewhere. */
const TEAL = '#005B63'

/** The mark of the product: three beads on a thread. */
export function mark(): Svg {
  const { ink } = lightTokens
  return svgElement(
    'svg',
    { xmlns: 'http://www.w3.org/2000/svg', width: 20, height: 17, viewBox: '0 0 30 25' },
    svgPath('M5 17 15 7.5 25 17', { stroke: ink, 'stroke-width': 1.8 }),
    svgElement('circle', { cx: 5, cy: 17, r: 3.6, fill: '#FFFFFF', stroke: ink, 'stroke-width': 1.8 }),
    svgElement('circle', { cx: 15, cy: 7.5, r: 5, fill: TEAL }),
    svgElement('circle', { cx: 25, cy: 17, r: 3.6, fill: ink }),
  )
}

/** The hatching that marks invented data. */
export function hatch(): Svg {
  const [width, height] = [18, 8]
  const lines = [0, 4, 8, 12, 16].map(
    (x) => `M${x} ${height}L${Math.min(width, x + height)} ${Math.max(0, x + height - width)}`,
  )
  const stroke = { stroke: lightTokens.ink3, 'stroke-width': 0.7 }
  return sheetSvg(
    width,
    height,
    'invented',
    svgPath(`M0 4L4 0${lines.join('')}`, stroke),
    svgElement('rect', {
      x: 0.35,
      y: 0.35,
      width: width - 0.7,
      height: height - 0.7,
      fill: 'none',
      ...stroke,
    }),
  )
}
