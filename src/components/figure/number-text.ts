import { formatCount, formatFixed } from '@/format/numbers'

/** A number with fixed decimals and a real minus; whole numbers have their thousands parted. */
export function fixedText(value: number, decimals = 0): string {
  return decimals === 0 ? formatCount(Math.round(value) + 0) : formatFixed(value, decimals)
}

/** A number to so many significant digits but at most so many decimals, written out without powers of ten. */
export function significantText(value: number, digits: number, mostDecimals = 10): string {
  return fixedText(value, Math.min(mostDecimals, decimalsFor(value, digits)))
}

/** Decimals that show `digits` significant digits of a number: none for large ones, ten at most. */
export function decimalsFor(value: number, digits: number): number {
  if (value === 0) return 0
  return Math.min(10, Math.max(0, digits - 1 - Math.floor(Math.log10(Math.abs(value)))))
}

/** Decimals of an energy at most: a hundredth of any energy unit is below what a sample can tell. */
const MOST_DECIMALS = 2

/**
 * A value with its 95 % half width, both to the two digits the half width earns but at most two decimals: "3.80 ± 0.41".
 * Without a half width, or where it rounds to nothing, three significant digits and no ±.
 */
export function bandText(value: number, halfWidth: number | null): string {
  if (halfWidth === null || !(halfWidth >= 0.5 / 10 ** MOST_DECIMALS))
    return significantText(value, 3, MOST_DECIMALS)
  const decimals = Math.min(MOST_DECIMALS, decimalsFor(halfWidth, 2))
  return `${fixedText(value, decimals)} ± ${fixedText(halfWidth, decimals)}`
}

/** From one edge of a bin to the other: "130–132", and where a minus would run into the dash "−48 to −44". */
export function rangeText(low: number, high: number, decimals: number): string {
  const ends = [fixedText(low, decimals), fixedText(high, decimals)]
  return ends.join(low < 0 || high < 0 ? ' to ' : '–')
}
