/**
 * How a smooth log-density is written down: η at each bin midpoint is a short sum of coefficients, and roughness is the
 * sum of squares of third differences of the coefficients. Two kinds exist: `identityBasis`, one coefficient per bin, and
 * `splineBasis`, cubic B-splines. Plain arrays, so that the hot loops stay flat.
 */
export interface SmoothingBasis {
  readonly bins: number
  /** Number of coefficients. */
  readonly size: number
  readonly periodic: boolean
  /** Coefficients per bin: 1 or 4. Those of bin i are `starts[i]`, `starts[i] + 1`, … modulo `size`. */
  readonly width: number
  readonly starts: Int32Array
  /** Basis functions at the midpoints, index bin · width + k. */
  readonly values: Float64Array
  /** Third differences: row r acts on coefficients `penaltyStarts[r]` … + 3, modulo `size`. */
  readonly penaltyStarts: Int32Array
  /** Index row · 4 + k. */
  readonly penaltyValues: Float64Array
  /** λ on these coefficients = λ per bin index · this. */
  readonly lambdaScale: number
  /** Whether the curve is level at its upper end, where it goes on as its own mirror image. */
  readonly mirrored: boolean
}

/**
 * Polynomials that third differences do not see: a parabola; with a mirror one that is level there; on a circle a
 * constant.
 */
export function penaltyNullity(basis: SmoothingBasis): number {
  if (basis.periodic) return 1
  return basis.mirrored ? 2 : 3
}
