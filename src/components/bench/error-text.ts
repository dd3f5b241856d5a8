import { decimalsFor, fixedText, significantText } from '@/components/figure/number-text'

/**
 * A value with its standard deviation, both to the two digits the deviation earns: "421 ± 13", "18.6 ± 1.2". Without one,
 * four significant digits and no ±.
 *
 * @param mostDecimals more are not written; where the deviation then rounds to nothing there is no ±
 */
export function errorText(value: number, deviation: number | null, mostDecimals = 10): string {
  if (deviation === null || !(deviation >= 0.5 / 10 ** mostDecimals)) {
    return significantText(value, 4, mostDecimals)
  }
  const decimals = Math.min(mostDecimals, decimalsFor(deviation, 2))
  return `${fixedText(value, decimals)} ± ${fixedText(deviation, decimals)}`
}
