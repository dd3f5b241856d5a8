import { italic, lightTokens, type Svg, type SvgAttributes, svgElement, svgEscape } from '../picture'
import type { CoordinateKind } from '../units'

/** Fonts of drawings on a sheet: Fira Sans with its signs on screen; the PDF embeds the first. */
const FONTS = "'Fira Sans', 'Fira Signs', sans-serif"

/** Size of labels in drawings, pt. */
export const LABEL = 7.5

/** A drawing on the sheet: no ground of its own. One unit is a point in print. */
export function sheetSvg(width: number, height: number, title: string, ...body: readonly Svg[]): Svg {
  return svgElement(
    'svg',
    {
      xmlns: 'http://www.w3.org/2000/svg',
      width,
      height,
      viewBox: `0 0 ${width} ${height}`,
      role: 'img',
      'font-family': FONTS,
      'font-size': LABEL,
      'aria-label': title,
    },
    ...body,
  )
}

/** Words in a drawing. */
export function label(text: Svg, x: number, y: number, attributes: SvgAttributes = {}): Svg {
  return svgElement('text', { x, y, fill: lightTokens.ink2, ...attributes }, text)
}

const SYMBOLS: Readonly<Record<CoordinateKind, string>> = { bond: 'r', angle: 'θ', dihedral: 'φ' }

/** The head of an axis: the symbol in italics and its unit. */
export function axisHead(kind: CoordinateKind, unit: string): Svg {
  return `${italic(SYMBOLS[kind])}${svgEscape(` / ${unit}`)}`
}
