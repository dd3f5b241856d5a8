import type { CoordinateKind } from '../units'

/**
 * Continuation of a potential beyond its data. With d ≥ 0 the distance from `coordinate` outwards, s the slope and c the
 * curvature: U = energy + s·d + ½c·d², with c above zero, so that the tail never turns down; or, where it has to be level at
 * d = span, dU/dd = (s + (c + s/span)·d)·(1 − d/span), with c + s/span above zero.
 */
export interface PotentialTail {
  /** Where the tail takes over, nm or rad. */
  readonly coordinate: number
  /** kJ/mol */
  readonly energy: number
  /** dU/dd outwards, kJ/mol per nm or rad. */
  readonly slope: number
  /** d²U/dd² where the tail takes over, kJ/mol per nm² or rad². */
  readonly curvature: number
  /** Distance at which the tail is level, above 0; null for a plain quadratic. */
  readonly span: number | null
}

/**
 * A potential as plain data: a cubic spline through its knots, continued by tails; periodic for a dihedral.
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
  /** null for a dihedral, and where the spline reaches the end of the domain; beyond its coordinate no knot counts. */
  readonly lowTail: PotentialTail | null
  readonly highTail: PotentialTail | null
}
