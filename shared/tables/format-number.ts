/** Significant digits of every number in a table, on screen and in a file. */
export const SIGNIFICANT_DIGITS = 7

/**
 * Rounds to the digits a table prints; −0 becomes 0.
 *
 * @param value finite
 * @example roundSignificant(0.123456789) // 0.1234568
 */
export function roundSignificant(value: number): number {
  return Number(value.toPrecision(SIGNIFICANT_DIGITS)) + 0
}

/**
 * The one way a number of a table is written: at most seven significant digits, no trailing zeros, a point as decimal
 * sign, an exponent only below 1e-6 and from 1e21.
 *
 * @param value finite
 * @example formatNumber(-12.3400001) // '-12.34'
 */
export function formatNumber(value: number): string {
  return String(roundSignificant(value))
}
