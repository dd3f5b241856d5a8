import type { NumberFormat } from './layout'

/**
 * A number as a layout writes it: with a point, without a sign before zero, at least `width` characters wide.
 *
 * @param value finite
 * @example formatValue(-1234.5, { style: 'scientific', digits: 3, width: 12 }) // '  -1.234e+03'
 */
export function formatValue(value: number, format: NumberFormat): string {
  return plainValue(value, format).padStart(format.width)
}

/** As `formatValue`, without blanks before it: for texts around the rows. */
export function plainValue(value: number, { style, digits }: NumberFormat): string {
  const text =
    style === 'fixed'
      ? value.toFixed(digits)
      : style === 'scientific'
        ? twoDigitExponent(value.toExponential(digits))
        : String(Number(value.toPrecision(Math.max(1, digits))))
  return Number(text) === 0 ? text.replace(/^-/, '') : text
}

/** Exponents of one digit are written with two, so that columns keep their width. */
function twoDigitExponent(text: string): string {
  return text.replace(/e([+-])(\d)$/, 'e$10$2')
}
