import type { SmoothingBasis } from './smoothing-basis'

const STENCIL = [-1, 3, -3, 1]
/** Spacings that differ by less than this share count as uniform and get whole-number differences. */
const UNIFORM = 1e-6

/**
 * One coefficient per bin. Third differences are divided differences 6 h³ η[x₀, x₁, x₂, x₃] · √(local spacing / h) with h
 * the mean spacing: on uniform bins the stencil −1, 3, −3, 1, and otherwise the same λ stands for the same ∫ (η‴)² dq.
 *
 * With a mirror the bins go on beyond it as their own images. Of the differences across it, counted for one half, a single
 * one is left: that of the last three bins and the first image. The one about the mirror vanishes by symmetry, and the
 * others are images of earlier ones. Counts and penalty of the whole are then twice those of the half, so λ is the same.
 *
 * @param midpoints ascending, at least 4
 * @param period 2π for a dihedral, whose bins then fill the turn, or null
 * @param mirror last edge, where the curve is level, or null; not with a period
 */
export function identityBasis(
  midpoints: Float64Array,
  period: number | null,
  mirror: number | null = null,
): SmoothingBasis {
  const bins = midpoints.length
  const periodic = period !== null
  const inner = periodic ? bins : bins - 3
  const rows = mirror === null ? inner : inner + 1
  const at = (index: number) => midpoints[index % bins] + (index >= bins ? (period ?? 0) : 0)
  const mean = (period ?? midpoints[bins - 1] - midpoints[0]) / (periodic ? bins : bins - 1)
  const penaltyValues = new Float64Array(rows * 4)
  for (let row = 0; row < inner; row++) {
    const points = [at(row), at(row + 1), at(row + 2), at(row + 3)]
    penaltyValues.set(thirdDifference(points, mean), row * 4)
  }
  if (mirror !== null) {
    const points = [at(bins - 3), at(bins - 2), at(bins - 1), 2 * mirror - at(bins - 1)]
    const [first, second, third, image] = thirdDifference(points, mean)
    penaltyValues.set([0, first, second, third + image], inner * 4)
  }
  return {
    bins,
    size: bins,
    periodic,
    width: 1,
    starts: Int32Array.from({ length: bins }, (_, bin) => bin),
    values: new Float64Array(bins).fill(1),
    penaltyStarts: Int32Array.from({ length: rows }, (_, row) => (row < inner ? row : bins - 4)),
    penaltyValues,
    lambdaScale: 1,
    mirrored: mirror !== null,
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
