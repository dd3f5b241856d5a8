import { pieceCurvature, pieceSlope, pieceValue, type SplinePiece } from '../numeric'
import type { Potential, PotentialTail } from './potential'

/**
 * Energy of a potential at a coordinate.
 *
 * @param coordinate nm or rad, anywhere in the domain of the kind; a dihedral may lie in any turn
 * @returns kJ/mol, at least 0 up to rounding
 */
export function potentialEnergy(potential: Potential, coordinate: number): number {
  const tail = tailAt(potential, coordinate)
  if (tail !== null) {
    const distance = Math.abs(coordinate - tail.coordinate)
    return tail.energy + distance * (tail.slope + 0.5 * tail.curvature * distance)
  }
  const folded = foldIntoPeriod(potential, coordinate)
  const index = pieceIndex(potential, folded)
  return pieceValue(pieceAt(potential, index), folded - potential.knots[index])
}

/**
 * Derivative dU/dq of a potential, from the same spline as its energy.
 *
 * @param coordinate nm or rad, anywhere in the domain of the kind; a dihedral may lie in any turn
 * @returns kJ/mol per nm or rad
 */
export function potentialSlope(potential: Potential, coordinate: number): number {
  const tail = tailAt(potential, coordinate)
  if (tail !== null) {
    const outwards = tail.slope + tail.curvature * Math.abs(coordinate - tail.coordinate)
    return coordinate < tail.coordinate ? -outwards : outwards
  }
  const folded = foldIntoPeriod(potential, coordinate)
  const index = pieceIndex(potential, folded)
  return pieceSlope(pieceAt(potential, index), folded - potential.knots[index])
}

/**
 * Second derivative d²U/dq² of a potential; continuous except where a tail takes over.
 *
 * @param coordinate nm or rad, anywhere in the domain of the kind; a dihedral may lie in any turn
 * @returns kJ/mol per nm² or rad²
 */
export function potentialCurvature(potential: Potential, coordinate: number): number {
  const tail = tailAt(potential, coordinate)
  if (tail !== null) return tail.curvature
  const folded = foldIntoPeriod(potential, coordinate)
  const index = pieceIndex(potential, folded)
  return pieceCurvature(pieceAt(potential, index), folded - potential.knots[index])
}

/** Knots, values and second derivatives of a spline; the part of a potential that its pieces need. */
export type SplineKnots = Pick<Potential, 'knots' | 'energies' | 'curvatures' | 'period'>

/** The cubic piece that starts at a knot; the last one of a dihedral leads over ±180° to the first knot. */
export function pieceAt({ knots, energies, curvatures, period }: SplineKnots, index: number): SplinePiece {
  const wraps = index === knots.length - 1
  const next = wraps ? 0 : index + 1
  return {
    width: knots[next] - knots[index] + (wraps && period !== null ? period : 0),
    startValue: energies[index],
    endValue: energies[next],
    startCurvature: curvatures[index],
    endCurvature: curvatures[next],
  }
}

function tailAt({ lowTail, highTail }: Potential, coordinate: number): PotentialTail | null {
  if (lowTail !== null && coordinate < lowTail.coordinate) return lowTail
  if (highTail !== null && coordinate > highTail.coordinate) return highTail
  return null
}

/** Into [first knot, first knot + period); coordinates of bonds and angles stay. */
function foldIntoPeriod({ knots, period }: SplineKnots, coordinate: number): number {
  if (period === null) return coordinate
  const turns = Math.floor((coordinate - knots[0]) / period)
  // Rounding of a tiny negative distance would land on the end of the period, which is no piece.
  return Math.max(knots[0], coordinate - turns * period)
}

/** The piece a coordinate lies on; before the first and after the last knot the end pieces continue. */
function pieceIndex({ knots, period }: SplineKnots, coordinate: number): number {
  let low = 0
  let high = period === null ? knots.length - 1 : knots.length
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (knots[middle] <= coordinate) low = middle
    else high = middle
  }
  return low
}
