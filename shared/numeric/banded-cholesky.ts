/**
 * L D Lᵀ of a symmetric positive definite matrix with p diagonals below the main one. Stored by rows: entry (i, i − k) of
 * L stands at i·(p + 1) + k, and D at k = 0 (the unit diagonal of L is not stored).
 */
export interface BandedFactor {
  readonly size: number
  /** p, the number of diagonals below the main one. */
  readonly halfBandwidth: number
  readonly values: Float64Array
}

/** A pivot that keeps less than this share of its diagonal has lost all but five digits of a double to cancellation. */
const LEAST_PIVOT = 1e-11

/**
 * Factors a banded symmetric matrix in place, in size·p² operations.
 *
 * @param matrix lower band by rows, entry (i, i − k) at i·(p + 1) + k; entries left of the first column are ignored;
 *   overwritten by the factor
 * @param leastPivot share of its diagonal that a pivot must keep
 * @returns null where cancellation leaves fewer than about five digits of a pivot (with the share proposed), or the matrix is not positive definite:
 *   `factorRows` then still gets a product A′A right
 */
export function factorBanded(
  matrix: Float64Array,
  size: number,
  halfBandwidth: number,
  leastPivot: number = LEAST_PIVOT,
): BandedFactor | null {
  const stride = halfBandwidth + 1
  for (let row = 0; row < size; row++) {
    const start = row * stride
    const reach = Math.min(halfBandwidth, row)
    let pivot = matrix[start]
    // From far to near, so that columns ascend. The row holds L·D first and is divided by D at the end.
    for (let k = reach - 1; k >= 1; k--) {
      const other = (row - k) * stride - k
      // Four sums side by side, so that none need wait for the one before it.
      let one = 0
      let two = 0
      let three = 0
      let four = 0
      let far = k + 1
      for (; far + 3 <= reach; far += 4) {
        one += matrix[start + far] * matrix[other + far]
        two += matrix[start + far + 1] * matrix[other + far + 1]
        three += matrix[start + far + 2] * matrix[other + far + 2]
        four += matrix[start + far + 3] * matrix[other + far + 3]
      }
      for (; far <= reach; far++) one += matrix[start + far] * matrix[other + far]
      matrix[start + k] -= one + two + (three + four)
    }
    for (let k = 1; k <= reach; k++) {
      const entry = matrix[start + k]
      const lower = entry / matrix[(row - k) * stride]
      matrix[start + k] = lower
      pivot -= entry * lower
    }
    if (!(pivot > leastPivot * matrix[start])) return null
    matrix[start] = pivot
  }
  return { size, halfBandwidth, values: matrix }
}

/**
 * Solves L D Lᵀ x = b in place.
 *
 * @param right b, length of the matrix; overwritten by x
 */
export function bandedSolve(
  { size, halfBandwidth, values }: BandedFactor,
  right: Float64Array,
): Float64Array {
  const stride = halfBandwidth + 1
  for (let row = 0; row < size; row++) {
    const reach = Math.min(halfBandwidth, row)
    let sum = right[row]
    for (let k = 1; k <= reach; k++) sum -= values[row * stride + k] * right[row - k]
    right[row] = sum
  }
  for (let row = 0; row < size; row++) right[row] /= values[row * stride]
  for (let row = size - 1; row >= 0; row--) {
    const solved = right[row]
    const reach = Math.min(halfBandwidth, row)
    for (let k = 1; k <= reach; k++) right[row - k] -= values[row * stride + k] * solved
  }
  return right
}

/**
 * The entries of the inverse that lie inside the band, without the rest of it, in size·p² operations
 * (Takahashi, Fagan, Chen, Proc. 8th PICA Conf. (1973) 63; Erisman & Tinney, Commun. ACM 18 (1975) 177).
 *
 * @returns lower band of the inverse, laid out as the matrix
 */
export function selectedInverse({ size, halfBandwidth, values }: BandedFactor): Float64Array {
  const stride = halfBandwidth + 1
  // Both triangles, entry (i, j) at i·width + j − i + p: the inner loop then runs along memory.
  const width = 2 * halfBandwidth + 1
  const inverse = new Float64Array(size * width)
  const below = new Float64Array(stride)
  for (let column = size - 1; column >= 0; column--) {
    const reach = Math.min(halfBandwidth, size - 1 - column)
    for (let k = 1; k <= reach; k++) below[k] = values[(column + k) * stride + k]
    const own = column * width + halfBandwidth
    let diagonal = 1 / values[column * stride]
    // Z(j, c) = −Σ_k L(k, c) Z(k, j) over the rows k below c; those Z lie in the band and are known.
    for (let k = 1; k <= reach; k++) {
      const row = (column + k) * width + halfBandwidth - k
      // Two sums side by side, so that one need not wait for the other.
      let odd = 0
      let even = 0
      let j = 1
      for (; j < reach; j += 2) {
        odd -= below[j] * inverse[row + j]
        even -= below[j + 1] * inverse[row + j + 1]
      }
      if (j === reach) odd -= below[j] * inverse[row + j]
      const sum = odd + even
      inverse[row] = sum
      inverse[own + k] = sum
      diagonal -= below[k] * sum
    }
    inverse[own] = diagonal
  }
  const lower = new Float64Array(size * stride)
  for (let row = 0; row < size; row++) {
    for (let k = 0; k <= halfBandwidth; k++)
      lower[row * stride + k] = inverse[row * width + halfBandwidth - k]
  }
  return lower
}
