import type { SmoothingBasis } from './smoothing-basis'

/**
 * Products with the tensor basis B_y ⊗ B_x in array form: one axis after the other, so that the cost is cells times the four
 * splines that reach a cell and no design matrix is ever laid out (GLAM: Eilers, Currie, Durbán, Comput. Stat. Data Anal. 50
 * (2006) 61). Grids and coefficients are row-major, the first coordinate outside.
 */

/**
 * η = B_x C B_y′ on a grid.
 *
 * @param coefficients index ix · size_y + iy
 * @returns index bin_x · bins_y + bin_y
 */
export function tensorValues(x: SmoothingBasis, y: SmoothingBasis, coefficients: Float64Array): Float64Array {
  const result = new Float64Array(x.bins * y.bins)
  const line = new Float64Array(y.size)
  for (let bin = 0; bin < x.bins; bin++) {
    line.fill(0)
    for (let k = 0; k < 4; k++) {
      const share = x.values[bin * 4 + k]
      const from = ((x.starts[bin] + k) % x.size) * y.size
      for (let index = 0; index < y.size; index++) line[index] += share * coefficients[from + index]
    }
    for (let other = 0; other < y.bins; other++) {
      const start = y.starts[other]
      let sum = 0
      for (let k = 0; k < 4; k++) {
        const index = start + k
        sum += y.values[other * 4 + k] * line[index < y.size ? index : index - y.size]
      }
      result[bin * y.bins + other] = sum
    }
  }
  return result
}

/** B_x′ R B_y: what a residual per cell asks of each coefficient. */
export function tensorProject(x: SmoothingBasis, y: SmoothingBasis, residuals: Float64Array): Float64Array {
  const result = new Float64Array(x.size * y.size)
  const line = new Float64Array(y.size)
  for (let bin = 0; bin < x.bins; bin++) {
    line.fill(0)
    for (let other = 0; other < y.bins; other++) {
      const residual = residuals[bin * y.bins + other]
      for (let k = 0; k < 4; k++) {
        const index = y.starts[other] + k
        line[index < y.size ? index : index - y.size] += y.values[other * 4 + k] * residual
      }
    }
    for (let k = 0; k < 4; k++) {
      const share = x.values[bin * 4 + k]
      const from = ((x.starts[bin] + k) % x.size) * y.size
      for (let index = 0; index < y.size; index++) result[from + index] += share * line[index]
    }
  }
  return result
}

/**
 * B′WB of the tensor basis.
 *
 * @param weights W, one per cell
 * @returns product of the coefficients (i, a) and (i + d, a + e) at ((i · 4 + d) · size_y + a) · 4 + e, with d and e from 0
 *   to 3; it equals that of (i, a + e) and (i + d, a)
 */
export function tensorGram(x: SmoothingBasis, y: SmoothingBasis, weights: Float64Array): Float64Array {
  const lineLength = y.size * 4
  const result = new Float64Array(x.size * 4 * lineLength)
  const line = new Float64Array(lineLength)
  for (let bin = 0; bin < x.bins; bin++) {
    line.fill(0)
    for (let other = 0; other < y.bins; other++) {
      const weight = weights[bin * y.bins + other]
      for (let k = 0; k < 4; k++) {
        const near = ((y.starts[other] + k) % y.size) * 4
        const share = weight * y.values[other * 4 + k]
        for (let far = k; far < 4; far++) line[near + far - k] += share * y.values[other * 4 + far]
      }
    }
    for (let k = 0; k < 4; k++) {
      const near = ((x.starts[bin] + k) % x.size) * 4
      for (let far = k; far < 4; far++) {
        const share = x.values[bin * 4 + k] * x.values[bin * 4 + far]
        const from = (near + far - k) * lineLength
        for (let index = 0; index < lineLength; index++) result[from + index] += share * line[index]
      }
    }
  }
  return result
}

/**
 * b′Zb in each cell for the basis functions b of the cell.
 *
 * @param sums entries of a symmetric Z laid out as `tensorGram` gives them, each the sum of all entries of Z that stand for it
 * @returns one per cell
 */
export function tensorQuadratic(x: SmoothingBasis, y: SmoothingBasis, sums: Float64Array): Float64Array {
  const lineLength = y.size * 4
  const result = new Float64Array(x.bins * y.bins)
  const line = new Float64Array(lineLength)
  for (let bin = 0; bin < x.bins; bin++) {
    line.fill(0)
    for (let k = 0; k < 4; k++) {
      const near = ((x.starts[bin] + k) % x.size) * 4
      for (let far = k; far < 4; far++) {
        const share = x.values[bin * 4 + k] * x.values[bin * 4 + far]
        const from = (near + far - k) * lineLength
        for (let index = 0; index < lineLength; index++) line[index] += share * sums[from + index]
      }
    }
    for (let other = 0; other < y.bins; other++) {
      let sum = 0
      for (let k = 0; k < 4; k++) {
        const near = ((y.starts[other] + k) % y.size) * 4
        for (let far = k; far < 4; far++) {
          sum += y.values[other * 4 + k] * y.values[other * 4 + far] * line[near + far - k]
        }
      }
      result[bin * y.bins + other] = sum
    }
  }
  return result
}
