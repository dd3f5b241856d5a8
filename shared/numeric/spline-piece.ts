/**
 * One cubic piece of a spline between two knots, from values and second derivatives at them. t is the distance from the
 * first knot; outside [0, h] the same cubic continues.
 */
export interface SplinePiece {
  /** Width h of the piece. */
  readonly width: number
  readonly startValue: number
  readonly endValue: number
  readonly startCurvature: number
  readonly endCurvature: number
}

/** Value of the piece at distance t from its first knot. */
export function pieceValue(piece: SplinePiece, t: number): number {
  const { width, startValue, endValue, startCurvature, endCurvature } = piece
  const u = width - t
  // Chord plus a term that vanishes at both knots: no cancellation of the large terms of the textbook form.
  return (
    (startValue * u + endValue * t) / width -
    (t * u * (startCurvature * (1 + u / width) + endCurvature * (1 + t / width))) / 6
  )
}

/** First derivative of the piece at distance t from its first knot. */
export function pieceSlope(piece: SplinePiece, t: number): number {
  const { width, startValue, endValue, startCurvature, endCurvature } = piece
  const u = width - t
  return (
    (endValue - startValue) / width +
    (startCurvature * (width - (3 * u * u) / width) + endCurvature * ((3 * t * t) / width - width)) / 6
  )
}

/** Second derivative of the piece at distance t from its first knot. */
export function pieceCurvature(piece: SplinePiece, t: number): number {
  return piece.startCurvature + ((piece.endCurvature - piece.startCurvature) * t) / piece.width
}
