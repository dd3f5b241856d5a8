import type { CoordinateKind } from '../units'

/**
 * Jacobian of an internal coordinate: the share of space at coordinate q that belongs to an interval dq.
 *
 * @param coordinate in nm or rad, inside the domain of its kind
 * @returns r² for a bond, sin θ for an angle, 1 for a dihedral
 */
export function jacobian(kind: CoordinateKind, coordinate: number): number {
  if (kind === 'bond') return coordinate * coordinate
  return kind === 'angle' ? Math.sin(coordinate) : 1
}
