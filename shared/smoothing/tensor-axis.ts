import { GAUSS_LEGENDRE, symmetricEigenvalues } from '../numeric'
import type { BinGeometry } from './effective-volumes'
import { penaltyNullity, type SmoothingBasis } from './smoothing-basis'
import { splineBasis } from './spline-basis'

/** B-splines a side: enough for a spread of half a standard deviation each, few enough for a quick Cholesky factor. */
export const TENSOR_COEFFICIENTS = { least: 7, most: 24 } as const

/** One axis of a tensor-product basis: cubic B-splines on equal segments, periodic where the bins fill a turn. */
export interface TensorAxis {
  readonly geometry: BinGeometry
  /** At the bin midpoints. */
  readonly basis: SmoothingBasis
  /** The same splines at the five Gauss–Legendre points of each bin, index bin · 5 + point. */
  readonly nodes: SmoothingBasis
  /** First edge and width of the segments, nm or rad. */
  readonly low: number
  readonly segment: number
  readonly segments: number
  /** Place of each coefficient along the axis in the band; on a circle interleaved from both sides. */
  readonly places: Int32Array
  /** Largest distance in places of coefficients that meet in a bin or a difference. */
  readonly reach: number
  /** D′D along the axis: entry (i, i + d) at i · 4 + d, coefficients modulo the size. */
  readonly penalty: Float64Array
  /** Eigenvalues of D′D, ascending; those of the polynomials it does not see are exactly 0. */
  readonly eigenvalues: Float64Array
}

/**
 * Lays out one axis.
 *
 * @param geometry at least 5 bins
 */
export function tensorAxis(geometry: BinGeometry): TensorAxis {
  const { edges, midpoints, period } = geometry
  const bins = midpoints.length
  const periodic = period !== null
  const size = Math.min(TENSOR_COEFFICIENTS.most, Math.max(TENSOR_COEFFICIENTS.least, bins))
  const [low, high] = [edges[0], edges[bins]]
  const basis = splineBasis(midpoints, low, high, periodic, size)
  const points = Float64Array.from({ length: bins * GAUSS_LEGENDRE.length }, (_, index) => {
    const [bin, point] = [Math.floor(index / GAUSS_LEGENDRE.length), index % GAUSS_LEGENDRE.length]
    return midpoints[bin] + (GAUSS_LEGENDRE[point].node * (edges[bin + 1] - edges[bin])) / 2
  })
  const segments = periodic ? size : size - 3
  const penalty = penaltyProducts(basis)
  return {
    geometry,
    basis,
    nodes: splineBasis(points, low, high, periodic, size),
    low,
    segment: (high - low) / segments,
    segments,
    places: Int32Array.from({ length: size }, (_, index) => {
      if (!periodic) return index
      return 2 * index < size ? 2 * index : 2 * (size - 1 - index) + 1
    }),
    reach: periodic ? 6 : 3,
    penalty,
    eigenvalues: penaltyEigenvalues(basis, penalty),
  }
}

function penaltyProducts({ size, penaltyStarts, penaltyValues }: SmoothingBasis): Float64Array {
  const products = new Float64Array(size * 4)
  penaltyStarts.forEach((start, row) => {
    for (let k = 0; k < 4; k++) {
      for (let far = k; far < 4; far++) {
        products[((start + k) % size) * 4 + far - k] +=
          penaltyValues[row * 4 + k] * penaltyValues[row * 4 + far]
      }
    }
  })
  return products
}

function penaltyEigenvalues(basis: SmoothingBasis, penalty: Float64Array): Float64Array {
  const { size } = basis
  const matrix = new Float64Array(size * size)
  for (let index = 0; index < size; index++) {
    for (let distance = 0; distance < 4; distance++) {
      const other = (index + distance) % size
      matrix[index * size + other] = penalty[index * 4 + distance]
      matrix[other * size + index] = penalty[index * 4 + distance]
    }
  }
  const eigenvalues = symmetricEigenvalues(matrix, size)
  return eigenvalues.fill(0, 0, penaltyNullity(basis))
}
