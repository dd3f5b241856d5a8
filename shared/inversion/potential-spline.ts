import { pieceCurvature, pieceSlope, pieceValue, type SplinePiece } from '../numeric'

/** Knots, values and second derivatives of a cubic spline. */
export interface SplineKnots {
  /** Ascending, at least 2, nm or rad; with a period all of one turn. */
  readonly knots: Float64Array
  /** kJ/mol */
  readonly energies: Float64Array
  /** kJ/mol per nm² or rad² */
  readonly curvatures: Float64Array
  /** 2π for a dihedral, else null. */
  readonly period: number | null
}

/** Value of the spline; before the first and after the last knot the end pieces continue. */
export function splineEnergy(spline: SplineKnots, coordinate: number): number {
  return onPiece(spline, coordinate, pieceValue)
}

/** First derivative of the spline. */
export function splineSlope(spline: SplineKnots, coordinate: number): number {
  return onPiece(spline, coordinate, pieceSlope)
}

/** Second derivative of the spline: continuous, linear between knots. */
export function splineCurvature(spline: SplineKnots, coordinate: number): number {
  return onPiece(spline, coordinate, pieceCurvature)
}

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

function onPiece(
  spline: SplineKnots,
  coordinate: number,
  read: (piece: SplinePiece, t: number) => number,
): number {
  const folded = foldIntoPeriod(spline, coordinate)
  const index = pieceIndex(spline, folded)
  return read(pieceAt(spline, index), folded - spline.knots[index])
}

/** Into [first knot, first knot + period); coordinates of bonds and angles stay. */
function foldIntoPeriod({ knots, period }: SplineKnots, coordinate: number): number {
  if (period === null) return coordinate
  const turns = Math.floor((coordinate - knots[0]) / period)
  // Rounding of a tiny negative distance would land on the end of the period, which is no piece.
  return Math.max(knots[0], coordinate - turns * period)
}

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
