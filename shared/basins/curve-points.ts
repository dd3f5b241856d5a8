import { type Potential, potentialEnergy } from '../inversion'
import { pieceAt } from '../inversion/potential-spline'
import { pieceSlope, type SplinePiece } from '../numeric'

/** Points of a potential between which it only rises or only falls. */
export interface CurvePoints {
  /** Ascending, nm or rad; on a dihedral one turn, each in [−π, π). */
  readonly coordinates: Float64Array
  /** kJ/mol */
  readonly energies: Float64Array
}

/**
 * Knots, ends and every place where the slope of the spline vanishes, over the range that holds data; over the whole turn of a
 * dihedral. The spline is monotonic between neighbouring points, so that its minima and barriers are among them, exactly.
 */
export function curvePoints(potential: Potential): CurvePoints {
  const { knots, period, populated } = potential
  const [low, high] = period === null ? populated : [-Math.PI, Math.PI]
  const pieces = period === null ? knots.length - 1 : knots.length
  const found = [low, ...knots]
  if (period === null) found.push(high)
  for (let index = 0; index < pieces; index++) {
    const piece = pieceAt(potential, index)
    const from = period === null && index === 0 ? -Infinity : 0
    const to = period === null && index === pieces - 1 ? Infinity : piece.width
    for (const t of levelPlaces(piece)) if (t > from && t < to) found.push(knots[index] + t)
  }
  const folded = found.map((coordinate) =>
    period !== null && coordinate >= high ? coordinate - period : coordinate,
  )
  const coordinates = Float64Array.from(new Set(folded))
    .filter((coordinate) => coordinate >= low && coordinate <= high)
    .sort()
  return { coordinates, energies: coordinates.map((coordinate) => potentialEnergy(potential, coordinate)) }
}

/** Where the slope a t² + b t + c of a piece vanishes; the form with q avoids the cancellation of b against the root. */
function levelPlaces(piece: SplinePiece): number[] {
  const a = (piece.endCurvature - piece.startCurvature) / (2 * piece.width)
  const b = piece.startCurvature
  const c = pieceSlope(piece, 0)
  const discriminant = b * b - 4 * a * c
  if (!(discriminant >= 0)) return []
  const q = -(b + (b < 0 ? -1 : 1) * Math.sqrt(discriminant)) / 2
  return [q / a, c / q].filter(Number.isFinite)
}
