const TABLE_LENGTH = 1024

const table = new Float64Array(TABLE_LENGTH)
for (let n = 2; n < TABLE_LENGTH; n++) table[n] = table[n - 1] + Math.log(n)

const HALF_LOG_TWO_PI = 0.5 * Math.log(2 * Math.PI)

/**
 * ln n! of a whole number: from a table below 1,024, from Stirling's series above, where its next term is below 1e-19.
 *
 * @param n whole, ≥ 0; not checked, since this stands in inner loops
 * @example logFactorial(4) // ln 24
 */
export function logFactorial(n: number): number {
  if (n < TABLE_LENGTH) return table[n]
  const inverse = 1 / n
  return (
    (n + 0.5) * Math.log(n) -
    n +
    HALF_LOG_TWO_PI +
    inverse * (1 / 12 - inverse * inverse * (1 / 360 - (inverse * inverse) / 1260))
  )
}
