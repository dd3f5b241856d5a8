import type { SmoothingBasis } from './smoothing-basis'

const STENCIL = [-1, 3, -3, 1]
/** Spacings that differ by less than this share count as uniform and get whole-number differences. */
const UNIFORM = 1e-6

/**
 * One coefficient per bin. Third differences are divided differences 6 h³ η[x₀, x₁, x₂, x₃] · √(local spacing / h) with h
 * the mean spacing: on uniform bins the stencil −1, 3, −3, 1, and otherwise the same λ stands for the same ∫ (η‴)² dq.
 *
 * @param midpoints ascending, at least 4
 * @param period 2π for a dihedral, whose bins then fill the turn, or null
 */
export function identityBasis(midpoints: Float64Array, period: number | null): SmoothingBasis {
  const bins = midpoints.length
  const periodic = period !== null
  const rows = periodic ? bins : bins - 3
  const at = (index: number) => midpoints[index % bins] + (index >= bins ? (period ?? 0) : 0)
  const mean = (period ?? midpoints[bins - 1] - midpoints[0]) / (periodic ? bins : bins - 1)
  const penaltyValues = new Float64Array(rows * 4)
  for (let row = 0; row < rows; row++) {
    const points = [at(row), at(row + 1), at(row + 2), at(row + 3)]
    penaltyValues.set(thirdDifference(points, mean), row * 4)
  }
  return {
    bins,
    size: bins,
    periodic,
    width: 1,
    starts: Int32Array.from({ length: bins }, (_, bin) => bin),
    values: new Float64Array(bins).fill(1),
    penaltyStarts: Int32Array.from({ length: rows }, (_, row) => row),
    penaltyValues,
    lambdaScale: 1,
  }
}

function thirdDifference(points: number[], mean: number): number[] {
  const uniform = [1, 2, 3].every((k) => Math.abs(points[k] - points[k - 1] - mean) < UNIFORM * mean)
  if (uniform) return STENCIL
  const local = Math.sqrt((points[3] - points[0]) / (3 * mean))
  return points.map((point, k) => {
    const product = points.reduce((all, other, j) => (j === k ? all : (all * (point - other)) / mean), 1)
    return (6 * local) / product
  })
}
