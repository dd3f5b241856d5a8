import { coordinateDomain } from '../histogram'
import { notAKnotCurvatures, periodicCurvatures, pieceCurvature, pieceSlope, pieceValue } from '../numeric'
import { type CoordinateKind, thermalEnergy } from '../units'
import type { Potential, PotentialTail } from './potential'
import { pieceAt, type SplineKnots } from './potential-energy'

/** A tail has at least this share of kT/σ², the stiffness of a spring with the spread of the data. */
const LEAST_STIFFNESS = 0.5
/** Where the curve still falls at the end of its data, the tail may carry it down by at most this much more, in kT. */
const MOST_FALL = 0.1

/** Values of a curve at its knots, before its least value is set to 0. */
export interface PotentialCurve {
  readonly kind: CoordinateKind
  readonly temperature: number
  /** At least 4, ascending; nm or rad. */
  readonly knots: Float64Array
  /** kJ/mol up to a constant. */
  readonly energies: Float64Array
  readonly deviations: Float64Array | null
  readonly populated: readonly [number, number]
  /** Where the spline ends and the tails take over; null on a side that reaches the end of the domain. */
  readonly tailsFrom: readonly [low: number | null, high: number | null]
  /** Variance of the coordinate in the data, nm² or rad². */
  readonly variance: number
}

/**
 * Makes a potential from values at knots: a not-a-knot cubic spline, periodic for a dihedral, with quadratic tails that
 * take value, slope and curvature over from the spline. A tail's curvature is never below half of kT/σ², so it cannot turn
 * down; where the curve still falls outwards, it is large enough to stop the fall within 0.1 kT.
 *
 * @returns the potential with its least value set to 0, where that value lies, and the constant that was taken away
 */
export function buildPotential(curve: PotentialCurve): {
  potential: Potential
  minimum: number
  constant: number
} {
  const { kind, temperature, knots, deviations, populated } = curve
  const period = kind === 'dihedral' ? 2 * Math.PI : null
  const curvatures =
    period === null
      ? notAKnotCurvatures(knots, curve.energies)
      : periodicCurvatures(knots, curve.energies, period)
  const spline: SplineKnots = { knots, energies: curve.energies, curvatures, period }
  const kT = thermalEnergy(temperature)
  const [lowTail, highTail] = curve.tailsFrom.map((coordinate, side) =>
    coordinate === null ? null : tail(spline, coordinate, side === 0 ? -1 : 1, kT, curve.variance),
  )
  const [start, end] = coordinateDomain(kind)
  const range: [number, number] = [curve.tailsFrom[0] ?? start, curve.tailsFrom[1] ?? end]
  const candidates = [
    ...splineMinima(spline, range),
    ...tailMinimum(lowTail, -1),
    ...tailMinimum(highTail, 1),
  ]
  const least = candidates.reduce((lowest, point) => (point.energy < lowest.energy ? point : lowest))
  const lower = (end: PotentialTail | null) => end && { ...end, energy: end.energy - least.energy }
  const potential: Potential = {
    kind,
    temperature,
    knots,
    energies: curve.energies.map((energy) => energy - least.energy),
    curvatures,
    deviations,
    populated,
    period,
    lowTail: lower(lowTail),
    highTail: lower(highTail),
  }
  return { potential, minimum: least.coordinate, constant: least.energy }
}

function tail(
  spline: SplineKnots,
  coordinate: number,
  outwards: -1 | 1,
  kT: number,
  variance: number,
): PotentialTail {
  const index = outwards < 0 ? 0 : spline.knots.length - 2
  const piece = pieceAt(spline, index)
  const t = coordinate - spline.knots[index]
  const slope = outwards * pieceSlope(piece, t)
  const toStopFall = slope < 0 ? (slope * slope) / (2 * MOST_FALL * kT) : 0
  return {
    coordinate,
    energy: pieceValue(piece, t),
    slope,
    curvature: Math.max(pieceCurvature(piece, t), (LEAST_STIFFNESS * kT) / variance, toStopFall),
  }
}

interface CurvePoint {
  readonly coordinate: number
  readonly energy: number
}

/** Ends and stationary points of all pieces; where the slope a t² + b t + c of a piece crosses zero. */
function splineMinima(spline: SplineKnots, [low, high]: readonly [number, number]): CurvePoint[] {
  const { knots, period } = spline
  const last = knots.length - 1
  const points: CurvePoint[] = []
  for (let index = 0; index <= (period === null ? last - 1 : last); index++) {
    const piece = pieceAt(spline, index)
    const from = period === null && index === 0 ? low - knots[0] : 0
    const to = period === null && index === last - 1 ? high - knots[index] : piece.width
    const a = (piece.endCurvature - piece.startCurvature) / (2 * piece.width)
    const b = piece.startCurvature
    const c = pieceSlope(piece, 0)
    const root = Math.sqrt(Math.max(0, b * b - 4 * a * c))
    // The two forms avoid the cancellation of b against the root; a rising slope marks a minimum.
    const stationary = b > 0 ? (-2 * c) / (b + root) : (root - b) / (2 * a)
    const inside = stationary > from && stationary < to ? [stationary] : []
    for (const t of [from, ...inside, to]) {
      points.push({ coordinate: inTurn(knots[index] + t, period), energy: pieceValue(piece, t) })
    }
  }
  return points
}

function inTurn(coordinate: number, period: number | null): number {
  return period !== null && coordinate >= Math.PI ? coordinate - period : coordinate
}

function tailMinimum(tail: PotentialTail | null, outwards: -1 | 1): CurvePoint[] {
  if (tail === null || tail.slope >= 0) return []
  const distance = -tail.slope / tail.curvature
  return [
    { coordinate: tail.coordinate + outwards * distance, energy: tail.energy + (tail.slope * distance) / 2 },
  ]
}
