import type { CoordinateKind } from '../units'

/**
 * Jacobian-weighted centroids ∫ q J dq / ∫ J dq of bins: where the raw, unsmoothed value of a bin belongs, since a value
 * placed there is free of the first-order error of the bin width.
 *
 * @param edges checked edges in internal units, length n + 1
 * @param useJacobian false gives the midpoints
 * @returns length n, each inside its bin
 * @example binCentroids('bond', Float64Array.of(0, 1)) // 3/4
 */
export function binCentroids(kind: CoordinateKind, edges: Float64Array, useJacobian = true): Float64Array {
  const centroid = useJacobian ? CENTROIDS[kind] : midpoint
  return Float64Array.from({ length: edges.length - 1 }, (_, bin) => centroid(edges[bin], edges[bin + 1]))
}

/**
 * Midpoints of bins: where the smooth log-density lives.
 *
 * @param edges ascending, length n + 1
 * @returns length n
 */
export function binMidpoints(edges: Float64Array): Float64Array {
  return Float64Array.from({ length: edges.length - 1 }, (_, bin) => midpoint(edges[bin], edges[bin + 1]))
}

const midpoint = (low: number, high: number): number => low + (high - low) / 2

// Written as midpoint plus a shift with h = half the width and m = midpoint, so that thin bins keep their digits:
// bond   m + (2/3) m h² / (m² + h²/3)
// angle  m + cot(m) (1 − h cot h), where 1 − h cot h is a series for small h
const CENTROIDS: Record<CoordinateKind, (low: number, high: number) => number> = {
  bond: (low, high) => {
    const half = (high - low) / 2
    const middle = low + half
    return middle + (2 * middle * half * half) / (3 * middle * middle + half * half)
  },
  angle: (low, high) => {
    const half = (high - low) / 2
    const middle = low + half
    return middle + oneMinusHalfCotangent(half) / Math.tan(middle)
  },
  dihedral: midpoint,
}

/** 1 − h cot h; the series h²/3 + h⁴/45 + 2h⁶/945 + h⁸/4725 below 0.1, where its remainder is under 1e-14 of it. */
function oneMinusHalfCotangent(half: number): number {
  if (half > 0.1) return 1 - half / Math.tan(half)
  const square = half * half
  return square * (1 / 3 + square * (1 / 45 + square * (2 / 945 + square / 4725)))
}
