import { coordinateDomain } from '../histogram'
import {
  mirroredCurvatures,
  notAKnotCurvatures,
  periodicCurvatures,
  pieceSlope,
  pieceValue,
} from '../numeric'
import { type CoordinateKind, thermalEnergy } from '../units'
import type { Potential, PotentialTail } from './potential'
import { pieceAt, type SplineKnots } from './potential-spline'
import { continueSpline, takeOver, tailEnergy, tailMinimum, type TailRule } from './potential-tail'

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
  /** How far out the spline may rule: as far as bins speak for it. */
  readonly reach: readonly [low: number, high: number]
  /** Variance of the coordinate in the data, nm² or rad². */
  readonly variance: number
}

/** What a user may choose about the ends of a potential. */
export interface EndRules {
  /** Least curvature of a tail in kT/σ², the stiffness of a spring with the spread of the data. */
  readonly stiffness: number
  /** Whether the slope of an angle has to vanish at 180°. */
  readonly level: boolean
}

/**
 * Makes a potential from values at knots: a not-a-knot cubic spline, periodic for a dihedral and mirrored at 180° for an
 * angle that has to be level there, with tails that take value, slope and curvature over from it. Beyond the data the
 * curvature is never below `stiffness` kT/σ², so the potential cannot turn down: where the spline bends less, a tail takes
 * over; where the curve still falls outwards, the tail stops the fall within 0.1 kT. Where an end has to be level, the tail
 * fades into it instead.
 *
 * @returns the potential with its least value set to 0, where that value lies, and the constant that was taken away
 */
export function buildPotential(
  curve: PotentialCurve,
  rules: EndRules,
): {
  potential: Potential
  minimum: number
  constant: number
} {
  const { kind, temperature, populated } = curve
  const level = kind === 'angle' && rules.level
  const { spline, deviations } = splineOf(curve, level)
  const kT = thermalEnergy(temperature)
  const least = (rules.stiffness * kT) / curve.variance
  const domain = coordinateDomain(kind)
  const endOf = (side: 0 | 1): { at: number; tail: PotentialTail | null } => {
    if (spline.period !== null) return { at: domain[side], tail: null }
    const outwards = side === 0 ? -1 : 1
    const inner = outwards * Math.min(outwards * populated[side], outwards * curve.reach[side])
    const levelAt = side === 1 && level ? Math.PI : null
    const at = levelAt === null ? takeOver(spline, inner, curve.reach[side], least) : inner
    const rule: TailRule = { least, mostFall: MOST_FALL * kT, levelAt }
    return { at, tail: at === domain[side] ? null : continueSpline(spline, at, outwards, rule) }
  }
  const [low, high] = [endOf(0), endOf(1)]
  const lowest = [
    ...splineMinima(spline, [low.at, high.at]),
    ...tailMinima(low.tail, -1),
    ...tailMinima(high.tail, 1),
  ].reduce((least, point) => (point.energy < least.energy ? point : least))
  const lower = (tail: PotentialTail | null) => tail && { ...tail, energy: tail.energy - lowest.energy }
  const potential: Potential = {
    kind,
    temperature,
    ...spline,
    energies: spline.energies.map((energy) => energy - lowest.energy),
    deviations,
    populated,
    lowTail: lower(low.tail),
    highTail: lower(high.tail),
  }
  return { potential, minimum: lowest.coordinate, constant: lowest.energy }
}

function splineOf(
  { kind, knots, energies, deviations, reach }: PotentialCurve,
  level: boolean,
): { spline: SplineKnots; deviations: Float64Array | null } {
  if (kind === 'dihedral') {
    const period = 2 * Math.PI
    const curvatures = periodicCurvatures(knots, energies, period)
    return { spline: { knots, energies, curvatures, period }, deviations }
  }
  if (!(level && reach[1] === Math.PI)) {
    const curvatures = notAKnotCurvatures(knots, energies)
    return { spline: { knots, energies, curvatures, period: null }, deviations }
  }
  // Between the last knot and its mirror image the spline is a parabola about 180°, where it gets a knot of its own.
  const last = knots.length - 1
  const curvatures = mirroredCurvatures(knots, energies, Math.PI)
  const rise = -(curvatures[last] * (Math.PI - knots[last]) ** 2) / 2
  const append = (values: Float64Array, value: number) => Float64Array.of(...values, value)
  return {
    spline: {
      knots: append(knots, Math.PI),
      energies: append(energies, energies[last] + rise),
      curvatures: append(curvatures, curvatures[last]),
      period: null,
    },
    deviations: deviations && append(deviations, deviations[last]),
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
    const ends = period === null ? [low - knots[index], high - knots[index]] : [0, piece.width]
    const from = index === 0 ? ends[0] : Math.max(0, ends[0])
    const to = index >= last - 1 ? ends[1] : Math.min(piece.width, ends[1])
    if (to < from) continue
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

function tailMinima(tail: PotentialTail | null, outwards: -1 | 1): CurvePoint[] {
  if (tail === null) return []
  const distance = tailMinimum(tail)
  return [{ coordinate: tail.coordinate + outwards * distance, energy: tailEnergy(tail, distance) }]
}
