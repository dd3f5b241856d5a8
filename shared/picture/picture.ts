import { lightTokens } from './light-tokens'
import { svgElement, svgEscape, type Svg } from './svg-writer'

/** A figure as it leaves the product. */
export interface Picture {
  /** In CSS pixels. */
  readonly width: number
  readonly height: number
  /** What it shows, in a line: the name of the document for whoever cannot see it. */
  readonly title: string
  readonly body: Svg
}

/** Fira Sans where it is installed, else a sans serif of the system; Greek letters and raised figures are in all of them. */
export const PICTURE_FONTS =
  "'Fira Sans', 'Fira Signs', FiraGO, 'Segoe UI', 'Helvetica Neue', Arial, sans-serif"

/**
 * A picture as an SVG document that stands alone: attributes instead of a style sheet, so that drawing programs read it, and
 * nothing from elsewhere.
 *
 * @param style rules for whoever draws it at once, as fonts to embed; a file has none
 */
export function svgDocument({ width, height, title, body }: Picture, style = ''): string {
  return svgElement(
    'svg',
    {
      xmlns: 'http://www.w3.org/2000/svg',
      width,
      height,
      viewBox: `0 0 ${width} ${height}`,
      role: 'img',
      'font-family': PICTURE_FONTS,
      'font-size': 12,
      style: 'font-variant-numeric: tabular-nums lining-nums',
    },
    svgElement('title', {}, svgEscape(title)),
    ...(style === '' ? [] : [svgElement('style', {}, svgEscape(style).replaceAll('&quot;', '"'))]),
    svgElement('rect', { width, height, fill: lightTokens.ground }),
    body,
  )
}
