/** Values closer than this share of their range are one value, printed in two ways. */
const SAME = 1e-9

/**
 * The distinct values of a column, ascending, and for each row the index of its value among them.
 *
 * @param values finite, at least one
 * @example distinctValues(Float64Array.of(2, 1, 2)) // distinct 1, 2; indices 1, 0, 1
 */
export function distinctValues(values: Float64Array): { distinct: Float64Array; indices: Int32Array } {
  const sorted = Float64Array.from(values).sort()
  const tolerance = SAME * (sorted[sorted.length - 1] - sorted[0])
  const distinct: number[] = [sorted[0]]
  for (const value of sorted) if (value - distinct[distinct.length - 1] > tolerance) distinct.push(value)
  const indices = Int32Array.from(values, (value) => lastAtOrBelow(distinct, value))
  return { distinct: Float64Array.from(distinct), indices }
}

function lastAtOrBelow(ascending: readonly number[], value: number): number {
  let low = 0
  let high = ascending.length
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (ascending[middle] <= value) low = middle
    else high = middle
  }
  return low
}
