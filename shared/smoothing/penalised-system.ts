import { type BandedFactor, type BandedRows, factorBanded, factorRows } from '../numeric'
import type { SmoothingBasis } from './smoothing-basis'

/** A weak spring on each coefficient: adds (strength/2)(β − level)² to what is minimised. */
export interface CoefficientHold {
  /** In counts; 0 for none. */
  readonly strength: number
  readonly level: number
}

/**
 * The matrix H = B′WB + λ D′D + hold of a basis as a band. On a circle the coefficients are interleaved from both sides
 * (0, n−1, 1, n−2, …), which turns the cyclic band into a plain one of twice the width, so that one solver serves both.
 */
export interface PenalisedSystem {
  readonly basis: SmoothingBasis
  readonly hold: CoefficientHold
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

/** The rows of D, of B and of the hold together, in the order of their first place. */
interface StackedRows {
  readonly rows: BandedRows
  /** What each row is weighted by: its bin, or one of `PENALTY_ROW` and `HOLD_ROW`. */
  readonly origins: Int32Array
}

/**
 * Above this ratio of λ to the mean weight per coefficient H is not summed up: the rounding of λ D′D would reach the
 * weights beside it, at this ratio with 1e-6 of the effective dimension.
 */
const STIFF = 1e8
const PENALTY_ROW = -1
const HOLD_ROW = -2

/** Lays out the band of a basis once; λ and weights come later. */
export function penalisedSystem(
  basis: SmoothingBasis,
  hold: CoefficientHold = { strength: 0, level: 0 },
): PenalisedSystem {
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
  return { basis, hold, halfBandwidth, places, penalty, slots, stackedRows }
}

function stackRows(
  { size, width, starts, values, penaltyStarts, penaltyValues, bins }: SmoothingBasis,
  places: Int32Array,
  stride: number,
): StackedRows {
  const row = (origin: number, start: number, entries: Float64Array) => {
    const columns = Array.from(entries, (_, k) => places[(start + k) % size])
    return { origin, entries, columns, first: Math.min(...columns) }
  }
  const all = [
    ...Array.from(penaltyStarts, (start, r) =>
      row(PENALTY_ROW, start, penaltyValues.subarray(r * 4, r * 4 + 4)),
    ),
    // With one coefficient per bin the hold adds to the weight of the bin and needs no rows of its own.
    ...Array.from({ length: width === 1 ? 0 : size }, (_, index) => row(HOLD_ROW, index, Float64Array.of(1))),
    ...Array.from({ length: bins }, (_, bin) =>
      row(bin, starts[bin], values.subarray(bin * width, (bin + 1) * width)),
    ),
  ].sort((one, other) => one.first - other.first)
  const stacked = new Float64Array(all.length * stride)
  all.forEach(({ entries, columns, first }, place) => {
    columns.forEach((column, k) => (stacked[place * stride + column - first] = entries[k]))
  })
  return {
    rows: { starts: Int32Array.from(all, ({ first }) => first), values: stacked },
    origins: Int32Array.from(all, ({ origin }) => origin),
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
  const { basis, hold, penalty, slots, halfBandwidth } = system
  const { width, values, bins, size } = basis
  let total = 0
  for (let bin = 0; bin < bins; bin++) total += weights[bin]
  if (lambda * size > STIFF * total) return factorStiff(system, weights, lambda)
  const matrix = new Float64Array(penalty.length)
  for (let entry = 0; entry < matrix.length; entry++) matrix[entry] = penalty[entry] * lambda
  for (let index = 0; index < size; index++) matrix[index * (halfBandwidth + 1)] += hold.strength
  let next = 0
  for (let bin = 0; bin < bins; bin++) {
    for (let j = 0; j < width; j++) {
      const share = weights[bin] * values[bin * width + j]
      for (let k = 0; k <= j; k++) matrix[slots[next++]] += share * values[bin * width + k]
    }
  }
  return factorBanded(matrix, size, halfBandwidth) ?? factorStiff(system, weights, lambda)
}

function factorStiff(system: PenalisedSystem, weights: Float64Array, lambda: number): BandedFactor {
  const { rows, origins } = system.stackedRows()
  const held = system.hold.strength
  const shared = system.basis.width === 1 ? held : 0
  const scales = new Float64Array(origins.length)
  for (let row = 0; row < scales.length; row++) {
    const origin = origins[row]
    const squared = origin === PENALTY_ROW ? lambda : origin === HOLD_ROW ? held : weights[origin] + shared
    scales[row] = Math.sqrt(squared)
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
