import { InvalidInputError } from '../errors'
import type { BandedFactor } from './banded-cholesky'

/** Rows of a matrix A whose product A′A is wanted, each with its non-zero entries inside a window of p + 1 columns. */
export interface BandedRows {
  /** First column of the window of each row; must ascend, or the cost is no longer linear. */
  readonly starts: Int32Array
  /** Entries, index row · (p + 1) + k for column `starts[row] + k`. */
  readonly values: Float64Array
}

/**
 * Factors A′A without forming it, by Givens rotations of the rows of A (George & Heath, Linear Algebra Appl. 34 (1980) 69).
 * Where rows differ in size by more than half the digits of a double, as in a very stiff penalty beside few counts, the
 * sum A′A would lose the small rows; this keeps them, at about five times the cost.
 *
 * @param scales factor of each row
 * @throws {InvalidInputError} SINGULAR_SYSTEM with the column that no row determines
 */
export function factorRows(
  { starts, values }: BandedRows,
  scales: Float64Array,
  size: number,
  halfBandwidth: number,
): BandedFactor {
  const stride = halfBandwidth + 1
  const upper = new Float64Array(size * stride)
  const row = new Float64Array(stride)
  for (let index = 0; index < starts.length; index++) {
    if (scales[index] === 0) continue
    for (let k = 0; k < stride; k++) row[k] = scales[index] * values[index * stride + k]
    insertRow(upper, row, starts[index], size, stride)
  }
  return toFactor(upper, size, halfBandwidth)
}

/** Rotates a row into the triangle until it is used up or finds an empty place. */
function insertRow(
  upper: Float64Array,
  row: Float64Array,
  start: number,
  size: number,
  stride: number,
): void {
  for (let column = start; column < size; column++) {
    const place = column * stride
    const lead = row[0]
    if (lead !== 0) {
      const pivot = upper[place]
      if (pivot === 0) {
        upper.set(row, place)
        return
      }
      const length = Math.sqrt(pivot * pivot + lead * lead)
      const [cosine, sine] = [pivot / length, lead / length]
      upper[place] = length
      for (let k = 1; k < stride; k++) {
        const [above, below] = [upper[place + k], row[k]]
        upper[place + k] = cosine * above + sine * below
        row[k] = cosine * below - sine * above
      }
    }
    let left = 0
    for (let k = 1; k < stride; k++) {
      row[k - 1] = row[k]
      left += Math.abs(row[k])
    }
    row[stride - 1] = 0
    if (left === 0) return
  }
}

/** From R with A′A = R′R to L D L′. */
function toFactor(upper: Float64Array, size: number, halfBandwidth: number): BandedFactor {
  const stride = halfBandwidth + 1
  const values = new Float64Array(size * stride)
  for (let column = 0; column < size; column++) {
    const pivot = upper[column * stride]
    if (!(Math.abs(pivot) > 0)) {
      throw new InvalidInputError('SINGULAR_SYSTEM', 'The data do not determine a smooth curve.', {
        index: column,
      })
    }
    values[column * stride] = pivot * pivot
    const reach = Math.min(halfBandwidth, size - 1 - column)
    for (let k = 1; k <= reach; k++) values[(column + k) * stride + k] = upper[column * stride + k] / pivot
  }
  return { size, halfBandwidth, values }
}
