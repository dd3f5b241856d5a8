import { cubicBSplines } from '../numeric'
import type { SmoothingBasis } from './smoothing-basis'

const STENCIL = [-1, 3, -3, 1]

/**
 * Cubic B-splines on equal segments (Eilers & Marx, Stat. Sci. 11 (1996) 89): for fine histograms, where third
 * differences of thousands of single bins would lose all digits in double precision. λ stays per bin index:
 * λ on coefficients = λ · (bin width / segment width)⁵, since both stand for the same multiple of ∫ (η‴)² dq.
 *
 * @param midpoints ascending, inside [low, high]
 * @param low first edge of the fitted range
 * @param high last edge of the fitted range; for a periodic basis low + period
 * With a mirror at `high` the last coefficient is the image of the last but two and is left out; see `identityBasis`.
 *
 * @param size number of coefficients, at least 7
 * @param mirrored whether the curve is level at `high`; not with a period
 */
export function splineBasis(
  midpoints: Float64Array,
  low: number,
  high: number,
  periodic: boolean,
  size: number,
  mirrored = false,
): SmoothingBasis {
  const bins = midpoints.length
  const segments = periodic ? size : mirrored ? size - 2 : size - 3
  const segment = (high - low) / segments
  const starts = new Int32Array(bins)
  const values = new Float64Array(bins * 4)
  for (let bin = 0; bin < bins; bin++) {
    const position = (midpoints[bin] - low) / segment
    const index = Math.min(segments - 1, Math.floor(position))
    const splines = cubicBSplines(position - index)
    // In the last segment before a mirror the fourth spline is the image of the second.
    const folds = mirrored && index === segments - 1
    starts[bin] = folds ? index - 1 : index
    values.set(folds ? foldFourth(splines) : splines, bin * 4)
  }
  const rows = periodic ? size : mirrored ? size - 2 : size - 3
  const penaltyValues = new Float64Array(rows * 4)
  for (let row = 0; row < rows; row++) penaltyValues.set(STENCIL, row * 4)
  if (mirrored) penaltyValues.set(foldFourth(STENCIL), (rows - 1) * 4)
  return {
    bins,
    size,
    periodic,
    width: 4,
    starts,
    values,
    penaltyStarts: Int32Array.from({ length: rows }, (_, row) => (periodic ? row : Math.min(row, size - 4))),
    penaltyValues,
    lambdaScale: ((high - low) / bins / segment) ** 5,
    mirrored,
  }
}

/** Weights of four coefficients, the fourth being the image of the second, as weights of the one before and the first three. */
function foldFourth([first, second, third, fourth]: readonly number[]): [number, number, number, number] {
  return [0, first, second + fourth, third]
}
