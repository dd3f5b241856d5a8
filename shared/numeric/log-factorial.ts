/** Below this from the sum of logarithms, so that small factorials are as good as they can be. */
const SUMMED = 1024

/** Below this the series is worked out once and kept; 2 MB at most, and only as far as somebody asked. */
const MOST_KEPT = 1 << 18

let table = summed()

const HALF_LOG_TWO_PI = 0.5 * Math.log(2 * Math.PI)

/**
 * ln n! of a whole number: the sum of logarithms below 1,024, Stirling's series above, where its next term is below 1e-19.
 * Values up to 2¹⁸ are kept once asked for, since random tables ask for the same ones a million times.
 *
 * @param n whole, ≥ 0; not checked, since this stands in inner loops
 * @example logFactorial(4) // ln 24
 */
export function logFactorial(n: number): number {
  if (n < table.length) return table[n]
  if (n >= MOST_KEPT) return stirling(n)
  extend(n)
  return table[n]
}

function summed(): Float64Array {
  const values = new Float64Array(SUMMED)
  for (let n = 2; n < SUMMED; n++) values[n] = values[n - 1] + Math.log(n)
  return values
}

function extend(n: number): void {
  const known = table.length
  const longer = new Float64Array(Math.min(MOST_KEPT, Math.max(n + 1, 2 * known)))
  longer.set(table)
  for (let index = known; index < longer.length; index++) longer[index] = stirling(index)
  table = longer
}

function stirling(n: number): number {
  const inverse = 1 / n
  return (
    (n + 0.5) * Math.log(n) -
    n +
    HALF_LOG_TWO_PI +
    inverse * (1 / 12 - inverse * inverse * (1 / 360 - (inverse * inverse) / 1260))
  )
}
