const MOST_SWEEPS = 30

/**
 * Eigenvalues of a small symmetric matrix by cyclic Jacobi rotations (Golub & Van Loan, Matrix Computations, §8.5): each
 * is right to rounding of the largest one.
 *
 * @param matrix row-major, size × size, symmetric; overwritten
 * @returns ascending, length `size`
 * @example symmetricEigenvalues(Float64Array.of(2, 1, 1, 2), 2) // 1, 3
 */
export function symmetricEigenvalues(matrix: Float64Array, size: number): Float64Array {
  for (let sweep = 0; sweep < MOST_SWEEPS; sweep++) {
    if (!rotateAll(matrix, size)) break
  }
  return Float64Array.from({ length: size }, (_, index) => matrix[index * size + index]).sort()
}

/** One sweep over all entries beside the diagonal; false when none was above rounding. */
function rotateAll(matrix: Float64Array, size: number): boolean {
  let rotated = false
  for (let p = 0; p < size - 1; p++) {
    for (let q = p + 1; q < size; q++) {
      const entry = matrix[p * size + q]
      const [one, other] = [matrix[p * size + p], matrix[q * size + q]]
      if (Math.abs(entry) <= Number.EPSILON * 0.01 * (Math.abs(one) + Math.abs(other))) continue
      rotated = true
      const ratio = (other - one) / (2 * entry)
      const tangent = (ratio >= 0 ? 1 : -1) / (Math.abs(ratio) + Math.hypot(1, ratio))
      const cosine = 1 / Math.hypot(1, tangent)
      rotate(matrix, size, p, q, cosine, tangent * cosine)
    }
  }
  return rotated
}

function rotate(matrix: Float64Array, size: number, p: number, q: number, cosine: number, sine: number) {
  for (let k = 0; k < size; k++) {
    const [one, other] = [matrix[k * size + p], matrix[k * size + q]]
    matrix[k * size + p] = cosine * one - sine * other
    matrix[k * size + q] = sine * one + cosine * other
  }
  for (let k = 0; k < size; k++) {
    const [one, other] = [matrix[p * size + k], matrix[q * size + k]]
    matrix[p * size + k] = cosine * one - sine * other
    matrix[q * size + k] = sine * one + cosine * other
  }
}
