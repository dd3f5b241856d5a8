import { decimalsFor, fixedText, significantText } from '@/components/figure/number-text'

/**
 * A value with its standard deviation, both to the two digits the deviation earns: "421 ± 13", "18.6 ± 1.2". Without one,
 * four significant digits and no ±.
 */
export function errorText(value: number, deviation: number | null): string {
  if (deviation === null || !(deviation > 0)) return significantText(value, 4)
  const decimals = decimalsFor(deviation, 2)
  return `${fixedText(value, decimals)} ± ${fixedText(deviation, decimals)}`
}
