import { InvalidInputError } from '../errors'
import type { CoordinateKind } from '../units'
import { binOf } from './accumulate'
import { checkEdges } from './check-edges'
import { checkIndependentSamples, checkWeights } from './create-histogram'
import type { BinContent } from './histogram'

/**
 * A histogram of two coordinates measured together, in internal units. Bins are half-open in each direction, the last
 * one closed. Made by `createJointHistogram`; trusted afterwards.
 */
export interface JointHistogram {
  readonly kinds: readonly [CoordinateKind, CoordinateKind]
  /** Ascending, length nx + 1. */
  readonly xEdges: Float64Array
  /** Ascending, length ny + 1. */
  readonly yEdges: Float64Array
  /** Row-major, index ix · ny + iy. Counts, or for 'density' and 'probability' the probability mass, with sum 1. */
  readonly weights: Float64Array
  readonly content: BinContent
  /** As for `Histogram`; null when nobody said. */
  readonly independentSamples: number | null
}

/** What `createJointHistogram` is given; arrays are copied. */
export interface JointHistogramInput {
  readonly kinds: readonly [CoordinateKind, CoordinateKind]
  readonly xEdges: ArrayLike<number>
  readonly yEdges: ArrayLike<number>
  /** Row-major, index ix · ny + iy; a density is per unit area of the two coordinates. */
  readonly weights: ArrayLike<number>
  readonly content: BinContent
  readonly independentSamples?: number | null
}

/**
 * Makes a joint histogram with the same rules as `createHistogram`.
 *
 * @throws {InvalidInputError} as `createHistogram`
 */
export function createJointHistogram(input: JointHistogramInput): JointHistogram {
  const xEdges = checkEdges(input.kinds[0], input.xEdges)
  const yEdges = checkEdges(input.kinds[1], input.yEdges)
  const rows = yEdges.length - 1
  const weights = checkWeights(input.weights, (xEdges.length - 1) * rows)
  if (input.content === 'density') {
    weights.forEach((density, cell) => {
      const [x, y] = [Math.floor(cell / rows), cell % rows]
      weights[cell] = density * (xEdges[x + 1] - xEdges[x]) * (yEdges[y + 1] - yEdges[y])
    })
  }
  const total = weights.reduce((sum, weight) => sum + weight, 0)
  if (!(total > 0 && Number.isFinite(total))) {
    throw new InvalidInputError('TOO_FEW_SAMPLES', 'The joint histogram is empty: all cells are zero.')
  }
  if (input.content !== 'count') weights.forEach((mass, cell) => (weights[cell] = mass / total))
  const independentSamples = input.independentSamples ?? null
  checkIndependentSamples(independentSamples, input.content === 'count' ? total : Infinity)
  return { kinds: input.kinds, xEdges, yEdges, weights, content: input.content, independentSamples }
}

/**
 * Counts pairs into a grid. Bins are half-open, the last one closed.
 *
 * @param x first coordinate of each pair, internal units
 * @param y second coordinate, same length
 * @returns counts, row-major, index ix · ny + iy
 * @throws {InvalidInputError} LENGTH_MISMATCH when x and y differ in length; NUMBER_NOT_FINITE or EDGE_OUT_OF_RANGE with
 *   the index of the first pair that is not a number or lies outside the grid
 */
export function accumulateJoint(
  x: ArrayLike<number>,
  y: ArrayLike<number>,
  xEdges: Float64Array,
  yEdges: Float64Array,
): Float64Array {
  if (x.length !== y.length) {
    throw new InvalidInputError(
      'LENGTH_MISMATCH',
      `There are ${x.length} first and ${y.length} second values.`,
    )
  }
  const rows = yEdges.length - 1
  const counts = new Float64Array((xEdges.length - 1) * rows)
  for (let index = 0; index < x.length; index++) {
    counts[binOf(x[index], xEdges, index) * rows + binOf(y[index], yEdges, index)] += 1
  }
  return counts
}
