import type { CoordinateKind } from '../units'

/**
 * Where a coordinate can be: bond [0, ∞) nm, angle [0, π] rad (π is straight), dihedral [−π, π) rad (0 is cis).
 *
 * @returns lower and upper end in internal units
 */
export function coordinateDomain(kind: CoordinateKind): readonly [low: number, high: number] {
  if (kind === 'bond') return [0, Infinity]
  return kind === 'angle' ? [0, Math.PI] : [-Math.PI, Math.PI]
}

/**
 * Folds a dihedral into [−π, π): +180° becomes −180°.
 *
 * @param angle in rad, finite
 * @example foldDihedral(Math.PI) // -Math.PI
 */
export function foldDihedral(angle: number): number {
  if (angle >= -Math.PI && angle < Math.PI) return angle
  const turn = 2 * Math.PI
  const folded = angle - turn * Math.floor((angle + Math.PI) / turn)
  return folded >= Math.PI ? -Math.PI : folded
}
