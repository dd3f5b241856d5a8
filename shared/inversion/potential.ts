import type { CoordinateKind } from '../units'

/**
 * Quadratic continuation of a potential beyond the range that was fitted. With d ≥ 0 the distance from `coordinate`
 * outwards, U = energy + slope·d + ½·curvature·d². The curvature is above zero, so the tail never turns down.
 */
export interface PotentialTail {
  /** Where the tail takes over, nm or rad. */
  readonly coordinate: number
  /** kJ/mol */
  readonly energy: number
  /** dU/dd outwards, kJ/mol per nm or rad. */
  readonly slope: number
  /** kJ/mol per nm² or rad², above 0. */
  readonly curvature: number
}

/**
 * A potential as plain data: a cubic spline through its knots, continued by quadratic tails; periodic for a dihedral.
 * Its least value is 0. Evaluate it with `potentialEnergy` and `potentialSlope`.
 */
export interface Potential {
  readonly kind: CoordinateKind
  /** State point it holds at, K. */
  readonly temperature: number
  /** Ascending, nm or rad; for a dihedral in [−π, π). */
  readonly knots: Float64Array
  /** kJ/mol at the knots, length of `knots`. */
  readonly energies: Float64Array
  /** Second derivatives of the spline at the knots, kJ/mol per nm² or rad². */
  readonly curvatures: Float64Array
  /**
   * Standard deviation of U(knot) − U(knot of least energy), kJ/mol; NaN at a knot that data say nothing about; null when
   * the number of independent samples is unknown.
   */
  readonly deviations: Float64Array | null
  /** Outer edges of the first and the last bin that holds data, nm or rad. */
  readonly populated: readonly [low: number, high: number]
  /** 2π for a dihedral, else null. */
  readonly period: number | null
  /** null for a dihedral, and where the spline reaches the end of the domain. */
  readonly lowTail: PotentialTail | null
  readonly highTail: PotentialTail | null
}
