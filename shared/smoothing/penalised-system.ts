import { type BandedFactor, type BandedRows, factorBanded, factorRows } from '../numeric'
import type { SmoothingBasis } from './smoothing-basis'

/**
 * The matrix H = B′WB + λ D′D of a basis as a band. On a circle the coefficients are interleaved from both sides
 * (0, n−1, 1, n−2, …), which turns the cyclic band into a plain one of twice the width, so that one solver serves both.
 */
export interface PenalisedSystem {
  readonly basis: SmoothingBasis
  readonly halfBandwidth: number
  /** Place of each coefficient in the band. */
  readonly places: Int32Array
  /** D′D as a band. */
  readonly penalty: Float64Array
  /** Where products of basis functions of a bin are added: index bin · pairs + pair, pairs (j, k ≤ j) by rows. */
  readonly slots: Int32Array
  /** The rows of D and B one by one, laid out when first asked for: only the stiff case needs them. */
  readonly stackedRows: () => StackedRows
}

/** The rows of D and of B together, in the order of their first place. */
interface StackedRows {
  readonly rows: BandedRows
  /** Which row each one is: r for row r of D, −1 − i for bin i. */
  readonly origins: Int32Array
}

/** Above this ratio of λ to the mean weight per coefficient the weights would lose half their digits beside λ D′D. */
const STIFF = 1e7

/** Lays out the band of a basis once; λ and weights come later. */
export function penalisedSystem(basis: SmoothingBasis): PenalisedSystem {
  const halfBandwidth = basis.periodic ? 6 : 3
  const stride = halfBandwidth + 1
  const { size, width } = basis
  const places = Int32Array.from({ length: size }, (_, index) => {
    if (!basis.periodic) return index
    return 2 * index < size ? 2 * index : 2 * (size - 1 - index) + 1
  })
  const slot = (one: number, other: number) => {
    const [a, b] = [places[one % size], places[other % size]]
    return Math.max(a, b) * stride + Math.abs(a - b)
  }
  const penalty = new Float64Array(size * stride)
  basis.penaltyStarts.forEach((start, row) => {
    for (let j = 0; j < 4; j++) {
      for (let k = 0; k <= j; k++) {
        penalty[slot(start + j, start + k)] +=
          basis.penaltyValues[row * 4 + j] * basis.penaltyValues[row * 4 + k]
      }
    }
  })
  const pairs = (width * (width + 1)) / 2
  const slots = new Int32Array(basis.bins * pairs)
  let next = 0
  for (let bin = 0; bin < basis.bins; bin++) {
    for (let j = 0; j < width; j++) {
      for (let k = 0; k <= j; k++) slots[next++] = slot(basis.starts[bin] + j, basis.starts[bin] + k)
    }
  }
  let stacked: StackedRows | null = null
  const stackedRows = () => (stacked ??= stackRows(basis, places, stride))
  return { basis, halfBandwidth, places, penalty, slots, stackedRows }
}

function stackRows(
  { size, width, starts, values, penaltyStarts, penaltyValues, bins }: SmoothingBasis,
  places: Int32Array,
  stride: number,
): StackedRows {
  const origins = [
    ...Array.from(penaltyStarts.keys()),
    ...Array.from({ length: bins }, (_, bin) => -1 - bin),
  ].map((origin) => {
    const [start, count] = origin < 0 ? [starts[-1 - origin], width] : [penaltyStarts[origin], 4]
    const columns = Array.from({ length: count }, (_, k) => places[(start + k) % size])
    return { origin, columns, first: Math.min(...columns) }
  })
  origins.sort((one, other) => one.first - other.first)
  const stacked = new Float64Array(origins.length * stride)
  origins.forEach(({ origin, columns, first }, row) => {
    columns.forEach((column, k) => {
      const value = origin < 0 ? values[(-1 - origin) * width + k] : penaltyValues[origin * 4 + k]
      stacked[row * stride + column - first] = value
    })
  })
  return {
    rows: { starts: Int32Array.from(origins, ({ first }) => first), values: stacked },
    origins: Int32Array.from(origins, ({ origin }) => origin),
  }
}

/**
 * Factors H = B′WB + λ D′D.
 *
 * @param weights W, one per bin
 * @param lambda on the coefficients
 * @throws {InvalidInputError} SINGULAR_SYSTEM when the weights do not determine the coefficients
 */
export function factorSystem(system: PenalisedSystem, weights: Float64Array, lambda: number): BandedFactor {
  const { basis, penalty, slots, halfBandwidth } = system
  const { width, values, bins, size } = basis
  let total = 0
  for (let bin = 0; bin < bins; bin++) total += weights[bin]
  if (lambda * size > STIFF * total) return factorStiff(system, weights, lambda)
  const matrix = new Float64Array(penalty.length)
  for (let entry = 0; entry < matrix.length; entry++) matrix[entry] = penalty[entry] * lambda
  let next = 0
  for (let bin = 0; bin < bins; bin++) {
    for (let j = 0; j < width; j++) {
      const share = weights[bin] * values[bin * width + j]
      for (let k = 0; k <= j; k++) matrix[slots[next++]] += share * values[bin * width + k]
    }
  }
  return factorBanded(matrix, size, halfBandwidth)
}

function factorStiff(system: PenalisedSystem, weights: Float64Array, lambda: number): BandedFactor {
  const { rows, origins } = system.stackedRows()
  const scales = new Float64Array(origins.length)
  for (let row = 0; row < scales.length; row++) {
    scales[row] = Math.sqrt(origins[row] < 0 ? weights[-1 - origins[row]] : lambda)
  }
  return factorRows(rows, scales, system.basis.size, system.halfBandwidth)
}

/**
 * Variance of η at each bin from the inverse of H: b′ H⁻¹ b.
 *
 * @param inverse selected inverse of the factor of H
 * @returns one per bin
 */
export function binVariances(system: PenalisedSystem, inverse: Float64Array): Float64Array {
  const { width, values, bins } = system.basis
  const variances = new Float64Array(bins)
  let next = 0
  for (let bin = 0; bin < bins; bin++) {
    let sum = 0
    for (let j = 0; j < width; j++) {
      for (let k = 0; k <= j; k++) {
        const product = values[bin * width + j] * values[bin * width + k] * inverse[system.slots[next++]]
        sum += k === j ? product : 2 * product
      }
    }
    variances[bin] = sum
  }
  return variances
}

/** η = Bβ at the midpoints. */
export function binValues(
  { width, values, starts, size, bins }: SmoothingBasis,
  coefficients: Float64Array,
): Float64Array {
  const result = new Float64Array(bins)
  for (let bin = 0; bin < bins; bin++) {
    let sum = 0
    for (let k = 0; k < width; k++) {
      const index = starts[bin] + k
      sum += values[bin * width + k] * coefficients[index < size ? index : index - size]
    }
    result[bin] = sum
  }
  return result
}

/** B′r: what a residual per bin asks of each coefficient. */
export function projectBins(
  { width, values, starts, size, bins }: SmoothingBasis,
  residuals: Float64Array,
): Float64Array {
  const result = new Float64Array(size)
  for (let bin = 0; bin < bins; bin++) {
    for (let k = 0; k < width; k++) {
      const index = starts[bin] + k
      result[index < size ? index : index - size] += values[bin * width + k] * residuals[bin]
    }
  }
  return result
}

/** Third differences Dβ. */
export function thirdDifferences(
  { penaltyStarts, penaltyValues, size }: SmoothingBasis,
  coefficients: Float64Array,
): Float64Array {
  const result = new Float64Array(penaltyStarts.length)
  for (let row = 0; row < result.length; row++) {
    let sum = 0
    for (let k = 0; k < 4; k++) {
      const index = penaltyStarts[row] + k
      sum += penaltyValues[row * 4 + k] * coefficients[index < size ? index : index - size]
    }
    result[row] = sum
  }
  return result
}

/** D′v. */
export function transposedDifferences(
  { penaltyStarts, penaltyValues, size }: SmoothingBasis,
  differences: Float64Array,
): Float64Array {
  const result = new Float64Array(size)
  for (let row = 0; row < differences.length; row++) {
    for (let k = 0; k < 4; k++) {
      const index = penaltyStarts[row] + k
      result[index < size ? index : index - size] += penaltyValues[row * 4 + k] * differences[row]
    }
  }
  return result
}
