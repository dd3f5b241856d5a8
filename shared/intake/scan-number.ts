const PLUS = 43
const MINUS = 45
const POINT = 46
const ZERO = 48
const NINE = 57
const UPPER_D = 68
const UPPER_E = 69
const LOWER_D = 100
const LOWER_E = 101

/** Up to this power a decimal factor is exact in double precision. */
const EXACT_POWER = 22
const POWERS_OF_TEN = Float64Array.from({ length: EXACT_POWER + 1 }, (_, exponent) => Number(`1e${exponent}`))

/** Up to this many digits a whole number is exact in double precision. */
const EXACT_DIGITS = 15

/**
 * The number that stands in `text` from `start` to `end`, exactly as `Number` would round it: a decimal number with an
 * optional exponent after e, E, d or D. Short numbers are put together digit by digit, since cutting strings is what
 * costs time in a file of a million lines.
 *
 * @returns NaN when the characters are not a number to the last one; ±Infinity when it is too large
 * @example scanNumber('x 1.5e-3', 2, 8) // 0.0015
 */
export function scanNumber(text: string, start: number, end: number): number {
  let at = start
  let code = text.charCodeAt(at)
  const negative = code === MINUS
  if (negative || code === PLUS) code = text.charCodeAt(++at)

  let digits = 0
  let significant = 0
  let mantissa = 0
  let scale = 0
  let pointSeen = false
  for (; at < end; code = text.charCodeAt(++at)) {
    if (code >= ZERO && code <= NINE) {
      digits++
      if (significant > 0 || code !== ZERO) significant++
      mantissa = mantissa * 10 + (code - ZERO)
      if (pointSeen) scale--
    } else if (code === POINT && !pointSeen) {
      pointSeen = true
    } else break
  }
  if (digits === 0) return NaN

  if (at < end) {
    if (code !== LOWER_E && code !== UPPER_E && code !== LOWER_D && code !== UPPER_D) return NaN
    const exponent = scanExponent(text, at + 1, end)
    if (Number.isNaN(exponent)) return NaN
    scale += exponent
  }
  if (significant > EXACT_DIGITS || scale > EXACT_POWER || scale < -EXACT_POWER) {
    return Number(text.slice(start, end).replace(/[dD]/, 'e'))
  }
  // One correctly rounded operation on two exact numbers gives the correctly rounded result.
  const magnitude = scale < 0 ? mantissa / POWERS_OF_TEN[-scale] : mantissa * POWERS_OF_TEN[scale]
  return negative ? -magnitude : magnitude
}

function scanExponent(text: string, start: number, end: number): number {
  let at = start
  const sign = text.charCodeAt(at)
  if (sign === MINUS || sign === PLUS) at++
  if (at >= end) return NaN
  let exponent = 0
  for (; at < end; at++) {
    const code = text.charCodeAt(at)
    if (code < ZERO || code > NINE) return NaN
    exponent = Math.min(exponent * 10 + (code - ZERO), 9999)
  }
  return sign === MINUS ? -exponent : exponent
}
