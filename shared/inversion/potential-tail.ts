import type { PotentialTail } from './potential'
import { type SplineKnots, splineCurvature, splineEnergy, splineSlope } from './potential-spline'

/** Energy of a tail at a distance d ≥ 0 outwards from where it takes over, kJ/mol. */
export function tailEnergy(tail: PotentialTail, d: number): number {
  return tail.energy + d * (tail.slope + d * (tail.curvature / 2 - (levelling(tail) * d) / 3))
}

/** dU/dd of a tail at a distance d ≥ 0 outwards. */
export function tailSlope(tail: PotentialTail, d: number): number {
  return tail.slope + d * (tail.curvature - levelling(tail) * d)
}

/** d²U/dd² of a tail at a distance d ≥ 0 outwards. */
export function tailCurvature(tail: PotentialTail, d: number): number {
  return tail.curvature - 2 * levelling(tail) * d
}

/** Least energy of a tail: its distance outwards, at most where it levels off. */
export function tailMinimum(tail: PotentialTail): number {
  if (tail.slope >= 0) return 0
  const { span } = tail
  if (span === null) return -tail.slope / tail.curvature
  return Math.min(span, -tail.slope / (tail.curvature + tail.slope / span))
}

/** What a tail needs to know beside the spline it continues. */
export interface TailRule {
  /** Least curvature, kJ/mol per nm² or rad². */
  readonly least: number
  /** Where the curve still falls, the tail may carry it down by at most this much more, kJ/mol. */
  readonly mostFall: number
  /** Where it has to be level, or null. */
  readonly levelAt: number | null
}

/**
 * A tail that takes value, slope and, where that is large enough, curvature over from a spline. Where the curve still falls
 * outwards, the curvature is raised until the fall stops within `mostFall`.
 *
 * A tail that has to be level at the distance L has the slope (s + b d)(1 − d/L): the line of the plain tail, faded out.
 * b = curvature + s/L is above 0, so it turns at most once, from falling to rising.
 */
export function continueSpline(
  spline: SplineKnots,
  coordinate: number,
  outwards: -1 | 1,
  { least, mostFall, levelAt }: TailRule,
): PotentialTail {
  const slope = outwards * splineSlope(spline, coordinate)
  const toStopFall = slope < 0 ? (slope * slope) / (2 * mostFall) : 0
  const span = levelAt === null ? null : Math.abs(levelAt - coordinate)
  const faded = span === null ? 0 : slope / span
  return {
    coordinate,
    energy: splineEnergy(spline, coordinate),
    slope,
    curvature: Math.max(splineCurvature(spline, coordinate), Math.max(least, toStopFall) - faded),
    span,
  }
}

/**
 * Where a tail takes over beyond the data: the spline rules on, out to `reach`, as long as its curvature stays at `least` or
 * above; empty bins make it rise, but between them and few counts it may bend over, and would turn down further out.
 */
export function takeOver(spline: SplineKnots, from: number, reach: number, least: number): number {
  const [low, high] = [Math.min(from, reach), Math.max(from, reach)]
  const between = [...spline.knots.subarray(0).filter((knot) => knot > low && knot < high)]
  const places = [...(reach > from ? between : between.reverse()), reach]
  let here = from
  let bend = splineCurvature(spline, here)
  if (bend < least) return here
  for (const next of places) {
    const ahead = splineCurvature(spline, next)
    if (ahead < least) return here + ((next - here) * (bend - least)) / (bend - ahead)
    here = next
    bend = ahead
  }
  return reach
}

/** b/L of a tail that levels off, 0 of a plain one. */
function levelling({ slope, curvature, span }: PotentialTail): number {
  return span === null ? 0 : (curvature + slope / span) / span
}
