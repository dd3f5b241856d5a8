/** A piece of an SVG document, well formed: all text in it is escaped. */
export type Svg = string

/** Values of attributes; null leaves the attribute out. */
export type SvgAttributes = Readonly<Record<string, string | number | null>>

/** An element with its attributes and what stands in it. Numbers are written to a hundredth of a pixel. */
export function svgElement(name: string, attributes: SvgAttributes, ...content: readonly Svg[]): Svg {
  const written = Object.entries(attributes)
    .filter(([, value]) => value !== null)
    .map(([key, value]) => ` ${key}="${typeof value === 'number' ? svgNumber(value) : svgEscape(value!)}"`)
    .join('')
  return content.length === 0 ? `<${name}${written}/>` : `<${name}${written}>${content.join('')}</${name}>`
}

/** A path, unfilled unless told otherwise. */
export function svgPath(d: string, attributes: SvgAttributes): Svg {
  return svgElement('path', { d, fill: 'none', ...attributes })
}

/** A number to a hundredth of a pixel. */
export function svgNumber(value: number): string {
  return String(Math.round(value * 100) / 100 + 0)
}

/** Text as the content of an element or an attribute. What XML cannot hold (most control characters) is left out. */
export function svgEscape(text: string): Svg {
  return text
    .replace(FORBIDDEN, '')
    .replaceAll('&', '&amp;')
    .replaceAll('<', '&lt;')
    .replaceAll('>', '&gt;')
    .replaceAll('"', '&quot;')
}

/** What is not a character of XML 1.0: control characters but tab and line ends, lone surrogates, U+FFFE and U+FFFF. */
const FORBIDDEN = /[^\t\n\r\u{20}-\u{D7FF}\u{E000}-\u{FFFD}\u{10000}-\u{10FFFF}]/gu

/** How far a subscript stands under the line, as a share of the size of the letters around it. */
const SUBSCRIPT_DROP = 0.22
const SUBSCRIPT_SIZE = 0.72

/**
 * A chemical formula with its numbers as subscripts: by size and place, since not every font has the signs.
 *
 * @param formula as C9H16O2
 * @param size of the letters around it, px
 */
export function svgFormula(formula: string, size: number): Svg {
  const parts = formula.match(/[\d.]+|[^\d.]+/g) ?? []
  const drop = SUBSCRIPT_DROP * size
  let low = false
  return (
    parts
      .map((part) => {
        const isNumber = /\d/.test(part)
        // The next letter stands on the line again: each part says how far it is from the one before.
        const dy = isNumber ? drop : low ? -drop : null
        low = isNumber
        return svgElement(
          'tspan',
          { dy, 'font-size': isNumber ? SUBSCRIPT_SIZE * size : null },
          svgEscape(part),
        )
      })
      // What follows the formula stands on the line, too; a shift needs a sign to stand with.
      .concat(low ? svgElement('tspan', { dy: -drop }, '\u200b') : [])
      .join('')
  )
}

/** Letters in italics, for symbols. */
export function italic(text: string): Svg {
  return svgElement('tspan', { 'font-style': 'italic' }, svgEscape(text))
}
