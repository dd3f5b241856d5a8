import { formatCount, formatFixed } from '@/format/numbers'

/** A number with fixed decimals and a real minus; whole numbers have their thousands parted. */
export function fixedText(value: number, decimals = 0): string {
  return decimals === 0 ? formatCount(Math.round(value) + 0) : formatFixed(value, decimals)
}

/** A number to so many significant digits, written out without powers of ten. */
export function significantText(value: number, digits: number): string {
  return fixedText(value, decimalsFor(value, digits))
}

/** Decimals that show `digits` significant digits of a number: none for large ones, ten at most. */
export function decimalsFor(value: number, digits: number): number {
  if (value === 0) return 0
  return Math.min(10, Math.max(0, digits - 1 - Math.floor(Math.log10(Math.abs(value)))))
}

/**
 * A value with its 95 % half width, both to the two digits the half width earns: "3.80 ± 0.41". Without a half width,
 * or where it is 0 by definition, three significant digits and no ±.
 */
export function bandText(value: number, halfWidth: number | null): string {
  if (halfWidth === null || !(halfWidth > 0)) return significantText(value, 3)
  const decimals = decimalsFor(halfWidth, 2)
  return `${fixedText(value, decimals)} ± ${fixedText(halfWidth, decimals)}`
}
