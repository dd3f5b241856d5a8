/**
 * Cubic splines as second derivatives at the knots. On an interval of width h between knots 0 and 1, with t the distance
 * from knot 0 and u = h − t: S = (M₀u³ + M₁t³)/6h + (y₀/h − M₀h/6)u + (y₁/h − M₁h/6)t
 * (de Boor, A Practical Guide to Splines, 1978).
 */

/**
 * Second derivatives of the not-a-knot cubic spline: the first and the last two pieces are each one cubic, so that a
 * parabola or a cubic is reproduced to rounding, ends included.
 *
 * @param x ascending knots, at least 4
 * @param y values at the knots, same length
 * @returns second derivatives at the knots
 */
export function notAKnotCurvatures(x: Float64Array, y: Float64Array): Float64Array {
  const last = x.length - 1
  const count = last - 1
  const { lower, diagonal, upper, right } = innerRows(x, y, count)
  const first = eliminateFirst(lower, diagonal, upper)
  const final = upper[count - 1] / lower[count - 1]
  diagonal[count - 1] += upper[count - 1] * (1 + final)
  lower[count - 1] -= upper[count - 1] * final
  const inner = solveTridiagonal(lower, diagonal, upper, right)
  const curvatures = new Float64Array(x.length)
  curvatures.set(inner, 1)
  curvatures[0] = inner[0] - (inner[1] - inner[0]) * first
  curvatures[last] = inner[count - 1] + (inner[count - 1] - inner[count - 2]) * final
  return curvatures
}

/**
 * Second derivatives of the cubic spline that goes on beyond its last knot as its own mirror image, so that its slope at
 * the mirror is 0; not-a-knot at the first knot.
 *
 * @param x ascending knots below the mirror, at least 4
 * @param y values at the knots, same length
 * @returns second derivatives at the knots; from the last knot to its image the spline is a parabola
 */
export function mirroredCurvatures(x: Float64Array, y: Float64Array, mirror: number): Float64Array {
  const last = x.length - 1
  const { lower, diagonal, upper, right } = innerRows(x, y, last)
  const first = eliminateFirst(lower, diagonal, upper)
  // The row of the last knot: the next one is its image, with the same value and the same second derivative.
  const before = x[last] - x[last - 1]
  lower[last - 1] = before
  diagonal[last - 1] = 2 * before + 6 * (mirror - x[last])
  right[last - 1] = (-6 * (y[last] - y[last - 1])) / before
  const inner = solveTridiagonal(lower, diagonal, upper, right)
  const curvatures = new Float64Array(x.length)
  curvatures.set(inner, 1)
  curvatures[0] = inner[0] - (inner[1] - inner[0]) * first
  return curvatures
}

/** Rows of the knots 1 … of an open spline, `count` in all; rows without a knot on both sides stay empty. */
function innerRows(x: Float64Array, y: Float64Array, count: number) {
  const [lower, diagonal, upper, right] = [0, 0, 0, 0].map(() => new Float64Array(count))
  for (let row = 0; row < Math.min(count, x.length - 2); row++) {
    const before = x[row + 1] - x[row]
    const after = x[row + 2] - x[row + 1]
    lower[row] = before
    diagonal[row] = 2 * (before + after)
    upper[row] = after
    right[row] = 6 * ((y[row + 2] - y[row + 1]) / after - (y[row + 1] - y[row]) / before)
  }
  return { lower, diagonal, upper, right }
}

/** A continuous third derivative at the second knot gives M₀ = M₁ − (M₂ − M₁)·h₀/h₁; returns h₀/h₁. */
function eliminateFirst(lower: Float64Array, diagonal: Float64Array, upper: Float64Array): number {
  const first = lower[0] / upper[0]
  diagonal[0] += lower[0] * (1 + first)
  upper[0] -= lower[0] * first
  return first
}

/**
 * Second derivatives of the periodic cubic spline with y(x₀ + period) = y₀.
 *
 * @param x ascending knots within one period, at least 3
 * @param y values at the knots, same length
 * @returns second derivatives at the knots
 */
export function periodicCurvatures(x: Float64Array, y: Float64Array, period: number): Float64Array {
  const count = x.length
  const [lower, diagonal, upper, right] = [0, 0, 0, 0].map(() => new Float64Array(count))
  for (let row = 0; row < count; row++) {
    const next = (row + 1) % count
    const previous = (row + count - 1) % count
    const before = x[row] - x[previous] + (row === 0 ? period : 0)
    const after = x[next] - x[row] + (next === 0 ? period : 0)
    lower[row] = before
    diagonal[row] = 2 * (before + after)
    upper[row] = after
    right[row] = 6 * ((y[next] - y[row]) / after - (y[row] - y[previous]) / before)
  }
  return solveCyclic(lower, diagonal, upper, right)
}

/** Thomas algorithm; stable without pivoting since the matrices here are diagonally dominant or nearly so. */
function solveTridiagonal(
  lower: Float64Array,
  diagonal: Float64Array,
  upper: Float64Array,
  right: Float64Array,
): Float64Array {
  const count = diagonal.length
  const factor = new Float64Array(count)
  const solution = Float64Array.from(right)
  let pivot = diagonal[0]
  solution[0] /= pivot
  for (let row = 1; row < count; row++) {
    factor[row] = upper[row - 1] / pivot
    pivot = diagonal[row] - lower[row] * factor[row]
    solution[row] = (solution[row] - lower[row] * solution[row - 1]) / pivot
  }
  for (let row = count - 2; row >= 0; row--) solution[row] -= factor[row + 1] * solution[row + 1]
  return solution
}

/** Cyclic tridiagonal system by the Sherman–Morrison formula; lower[0] and upper[n − 1] are the corners. */
function solveCyclic(
  lower: Float64Array,
  diagonal: Float64Array,
  upper: Float64Array,
  right: Float64Array,
): Float64Array {
  const last = diagonal.length - 1
  const [topRight, bottomLeft] = [lower[0], upper[last]]
  const shift = -diagonal[0]
  const changed = Float64Array.from(diagonal)
  changed[0] -= shift
  changed[last] -= (topRight * bottomLeft) / shift
  const correction = new Float64Array(last + 1)
  correction[0] = shift
  correction[last] = bottomLeft
  const base = solveTridiagonal(lower, changed, upper, right)
  const response = solveTridiagonal(lower, changed, upper, correction)
  const share = topRight / shift
  const factor = (base[0] + share * base[last]) / (1 + response[0] + share * response[last])
  return base.map((value, row) => value - factor * response[row])
}
