/** One number for each of the four cubic B-splines that reach a segment, the leftmost first. */
export type FourSplines = [number, number, number, number]

/**
 * The four uniform cubic B-splines that reach a segment; their sum is 1 (de Boor, A Practical Guide to Splines, 1978).
 *
 * @param t share of the segment, from 0 to 1
 */
export function cubicBSplines(t: number): FourSplines {
  const u = 1 - t
  return [
    (u * u * u) / 6,
    (3 * t * t * t - 6 * t * t + 4) / 6,
    (3 * u * u * u - 6 * u * u + 4) / 6,
    (t * t * t) / 6,
  ]
}

/**
 * Derivatives of `cubicBSplines` by t; their sum is 0.
 *
 * @param t share of the segment, from 0 to 1
 */
export function cubicBSplineSlopes(t: number): FourSplines {
  const u = 1 - t
  return [-(u * u) / 2, (t * (3 * t - 4)) / 2, (u * (4 - 3 * u)) / 2, (t * t) / 2]
}
