/**
 * Σ a_i b_i.
 *
 * @param other at least as long as `one`; not checked, since this stands in inner loops
 * @example dot(Float64Array.of(1, 2), Float64Array.of(3, 4)) // 11
 */
export function dot(one: Float64Array, other: Float64Array): number {
  let sum = 0
  for (let index = 0; index < one.length; index++) sum += one[index] * other[index]
  return sum
}

/**
 * The largest |a_i|; 0 for an empty array, NaN as soon as one of them is.
 *
 * @example largestMagnitude(Float64Array.of(1, -3, 2)) // 3
 */
export function largestMagnitude(values: Float64Array): number {
  let most = 0
  for (let index = 0; index < values.length; index++) most = Math.max(most, Math.abs(values[index]))
  return most
}
