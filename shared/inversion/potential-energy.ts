import type { Potential, PotentialTail } from './potential'
import { splineCurvature, splineEnergy, splineSlope } from './potential-spline'
import { tailCurvature, tailEnergy, tailSlope } from './potential-tail'

/**
 * Energy of a potential at a coordinate.
 *
 * @param coordinate nm or rad, anywhere in the domain of the kind; a dihedral may lie in any turn
 * @returns kJ/mol, at least 0 up to rounding
 */
export function potentialEnergy(potential: Potential, coordinate: number): number {
  const tail = tailAt(potential, coordinate)
  if (tail === null) return splineEnergy(potential, coordinate)
  return tailEnergy(tail, Math.abs(coordinate - tail.coordinate))
}

/**
 * Derivative dU/dq of a potential, from the same spline as its energy.
 *
 * @param coordinate nm or rad, anywhere in the domain of the kind; a dihedral may lie in any turn
 * @returns kJ/mol per nm or rad
 */
export function potentialSlope(potential: Potential, coordinate: number): number {
  const tail = tailAt(potential, coordinate)
  if (tail === null) return splineSlope(potential, coordinate)
  const outwards = tailSlope(tail, Math.abs(coordinate - tail.coordinate))
  return coordinate < tail.coordinate ? -outwards : outwards
}

/**
 * Second derivative d²U/dq² of a potential; continuous except where a tail takes over.
 *
 * @param coordinate nm or rad, anywhere in the domain of the kind; a dihedral may lie in any turn
 * @returns kJ/mol per nm² or rad²
 */
export function potentialCurvature(potential: Potential, coordinate: number): number {
  const tail = tailAt(potential, coordinate)
  if (tail === null) return splineCurvature(potential, coordinate)
  return tailCurvature(tail, Math.abs(coordinate - tail.coordinate))
}

function tailAt({ lowTail, highTail }: Potential, coordinate: number): PotentialTail | null {
  if (lowTail !== null && coordinate < lowTail.coordinate) return lowTail
  if (highTail !== null && coordinate > highTail.coordinate) return highTail
  return null
}
