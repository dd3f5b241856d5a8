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
  const lengths = new Int32Array(size)
  const row = new Float64Array(size + stride)
  for (let index = 0; index < starts.length; index++) {
    const scale = scales[index]
    if (scale === 0) continue
    const start = starts[index]
    const from = index * stride
    let end = start
    for (let k = 0; k < stride; k++) {
      row[start + k] = scale * values[from + k]
      if (row[start + k] !== 0) end = start + k + 1
    }
    insertRow(upper, lengths, row, start, end, stride)
  }
  return toFactor(upper, size, halfBandwidth)
}

/**
 * Rotates a row, which stands in `row` from column `start` to `end`, into the triangle until it is used up or finds an
 * empty place. `lengths` counts the entries of each row of the triangle up to its last one, so that zeros are not dragged
 * along.
 */
function insertRow(
  upper: Float64Array,
  lengths: Int32Array,
  row: Float64Array,
  start: number,
  end: number,
  stride: number,
): void {
  let last = end
  for (let column = start; column < last; column++) {
    const lead = row[column]
    row[column] = 0
    if (lead === 0) continue
    const place = column * stride
    const length = lengths[column]
    if (length === 0) {
      upper[place] = lead
      lengths[column] = last - column
      for (let k = 1; k < last - column; k++) {
        upper[place + k] = row[column + k]
        row[column + k] = 0
      }
      return
    }
    const pivot = upper[place]
    const radius = Math.sqrt(pivot * pivot + lead * lead)
    const cosine = pivot / radius
    const sine = lead / radius
    last = Math.max(last, column + length)
    lengths[column] = last - column
    upper[place] = radius
    for (let k = 1; k < last - column; k++) {
      const above = upper[place + k]
      const below = row[column + k]
      upper[place + k] = cosine * above + sine * below
      row[column + k] = cosine * below - sine * above
    }
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
