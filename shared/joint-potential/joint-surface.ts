import { cubicBSplines, cubicBSplineSlopes } from '../numeric'
import type { CoordinateKind } from '../units'

/** One axis of a joint surface: cubic B-splines on equal segments. */
export interface JointAxis {
  readonly kind: CoordinateKind
  /** Where the first segment begins, nm or rad. */
  readonly low: number
  /** Width of a segment, nm or rad. */
  readonly segment: number
  /** Number of coefficients; on a circle also of segments, otherwise three more than segments. */
  readonly size: number
  /** True for a dihedral, whose segments fill the turn. */
  readonly periodic: boolean
  /** Outer edges of the first and the last bin that holds data, nm or rad. */
  readonly populated: readonly [low: number, high: number]
  /** Least second difference of coefficients where the surface continues beyond the data, kJ/mol, above 0. */
  readonly leastBend: number
}

/**
 * A potential of two coordinates as plain data: a tensor product of cubic B-splines, twice continuously differentiable
 * everywhere; its least value is 0. Evaluate it with `jointEnergy` and `jointSlopes`.
 *
 * Beyond the first and the last coefficient of an axis (never of a dihedral) the coefficients of each line go on with
 * constant second differences: those of its last three, but at least `leastBend`, and enough to rise from the first step on.
 * Along that axis the surface is then exactly quadratic and never turns down. The three outermost lines go on as the steepest
 * of them. Beyond both axes the rise along one is added to the rise along the other.
 */
export interface JointSurface {
  /** State point it holds at, K. */
  readonly temperature: number
  readonly axes: readonly [x: JointAxis, y: JointAxis]
  /** kJ/mol, row-major, index ix · size_y + iy. */
  readonly coefficients: Float64Array
}

/**
 * Energy of a joint surface.
 *
 * @param x nm or rad, anywhere; a dihedral may lie in any turn
 * @param y as x
 * @returns kJ/mol, at least 0 up to rounding
 */
export function jointEnergy(surface: JointSurface, x: number, y: number): number {
  const [inX, inY] = [segmentAt(surface.axes[0], x), segmentAt(surface.axes[1], y)]
  return sumOver(surface, inX, inY, cubicBSplines(inX.share), cubicBSplines(inY.share))
}

/**
 * Derivatives ∂U/∂x and ∂U/∂y of a joint surface, from the same spline as its energy.
 *
 * @param x as in `jointEnergy`
 * @param y as in `jointEnergy`
 * @returns kJ/mol per nm or rad
 */
export function jointSlopes(surface: JointSurface, x: number, y: number): [alongX: number, alongY: number] {
  const [inX, inY] = [segmentAt(surface.axes[0], x), segmentAt(surface.axes[1], y)]
  const alongX = sumOver(surface, inX, inY, cubicBSplineSlopes(inX.share), cubicBSplines(inY.share))
  const alongY = sumOver(surface, inX, inY, cubicBSplines(inX.share), cubicBSplineSlopes(inY.share))
  return [alongX / surface.axes[0].segment, alongY / surface.axes[1].segment]
}

interface Place {
  /** Number of the segment; its splines have the coefficients `index` … + 3. */
  readonly index: number
  readonly share: number
}

function segmentAt({ low, segment }: JointAxis, coordinate: number): Place {
  const position = (coordinate - low) / segment
  const index = Math.floor(position)
  return { index, share: position - index }
}

function sumOver(
  surface: JointSurface,
  inX: Place,
  inY: Place,
  xShares: readonly number[],
  yShares: readonly number[],
): number {
  let sum = 0
  for (let i = 0; i < 4; i++) {
    for (let j = 0; j < 4; j++) {
      sum += xShares[i] * yShares[j] * coefficientAt(surface, inX.index + i, inY.index + j)
    }
  }
  return sum
}

function coefficientAt(surface: JointSurface, ix: number, iy: number): number {
  const [x, y] = surface.axes
  const [column, row] = [nearest(x, ix), nearest(y, iy)]
  const inside = surface.coefficients[column * y.size + row]
  const alongX = ix === column || x.periodic ? 0 : rise(surface, 0, row, ix - column)
  const alongY = iy === row || y.periodic ? 0 : rise(surface, 1, column, iy - row)
  return inside + alongX + alongY
}

/** The coefficient itself, or the last one on the way to it. */
function nearest({ size, periodic }: JointAxis, index: number): number {
  if (periodic) return index - size * Math.floor(index / size)
  return Math.min(Math.max(index, 0), size - 1)
}

/** What a line of coefficients along an axis gains over `steps` beyond its end. */
function rise({ axes, coefficients }: JointSurface, axis: 0 | 1, line: number, steps: number): number {
  const { size, leastBend } = axes[axis]
  const [stride, lineStride] = axis === 0 ? [axes[1].size, 1] : [1, axes[1].size]
  const end = steps > 0 ? (size - 1) * stride : 0
  const inwards = steps > 0 ? -stride : stride
  let [slope, bend] = [-Infinity, leastBend]
  for (const each of linesThatRiseTogether(axes[axis === 0 ? 1 : 0], line)) {
    const at = end + each * lineStride
    const last = coefficients[at] - coefficients[at + inwards]
    const before = coefficients[at + inwards] - coefficients[at + 2 * inwards]
    slope = Math.max(slope, last)
    bend = Math.max(bend, last - before, leastBend - last)
  }
  const count = Math.abs(steps)
  return count * slope + (bend * count * (count + 1)) / 2
}

/** The three outermost lines rise as the steepest of them: otherwise the corner behind them would begin with a descent. */
function linesThatRiseTogether({ size, periodic }: JointAxis, line: number): readonly number[] {
  if (periodic || (line > 2 && line < size - 3)) return [line]
  return line <= 2 ? [0, 1, 2] : [size - 3, size - 2, size - 1]
}
