import { GAUSS_LEGENDRE, mirroredCurvatures, notAKnotCurvatures, periodicCurvatures } from '../numeric'

/**
 * Most that ln of an effective volume may differ from ln of the exact one. A density that falls by more across a bin, as
 * beside a spike, is not resolved by the histogram, and the correction would only chase its own tail.
 */
export const LARGEST_CORRECTION = 5

/** Jacobian and geometry of the bins that effective volumes are taken over. */
export interface BinGeometry {
  /** Ascending, length n + 1. */
  readonly edges: Float64Array
  readonly midpoints: Float64Array
  /** Exact volumes ∫ J dq. */
  readonly volumes: Float64Array
  readonly jacobian: (coordinate: number) => number
  /** 2π when the bins fill a turn, else null. */
  readonly period: number | null
  /** Whether the density goes on beyond the last edge as its own mirror image, so that it is level there. */
  readonly mirrored: boolean
}

/**
 * Prepares the logarithms of effective volumes ∫_bin J(q) exp(η(q) − η(m)) dq about the midpoints m of bins, by Gauss–Legendre with five
 * points. With them as offset a bin is what it is, an average of exp η and not its value at one point (composite link:
 * Thompson & Baker, Appl. Stat. 30 (1981) 125; Eilers, Stat. Model. 7 (2007) 239); what is left of the bin-width error is
 * of fourth order.
 *
 * @param geometry at least 4 bins
 * @returns function from η at the midpoints to ln of the effective volumes; η between midpoints is a cubic spline
 */
export function logEffectiveVolumes(geometry: BinGeometry): (eta: Float64Array) => Float64Array {
  const { edges, midpoints, volumes, jacobian } = geometry
  const bins = midpoints.length
  const points = GAUSS_LEGENDRE.length
  const exactLogs = volumes.map(Math.log)
  const shares = new Float64Array(bins * points)
  const steps = new Float64Array(bins * points)
  for (let bin = 0; bin < bins; bin++) {
    const half = (edges[bin + 1] - edges[bin]) / 2
    GAUSS_LEGENDRE.forEach(({ node, weight }, point) => {
      steps[bin * points + point] = node * half
      shares[bin * points + point] = weight * half * jacobian(midpoints[bin] + node * half)
    })
  }
  return (eta) => {
    const curvatures = splineCurvatures(geometry, eta)
    const result = new Float64Array(bins)
    const changes = new Float64Array(points)
    for (let bin = 0; bin < bins; bin++) {
      const left = taylorTowards(geometry, eta, curvatures, bin, -1)
      const right = taylorTowards(geometry, eta, curvatures, bin, 1)
      let largest = -Infinity
      for (let point = 0; point < points; point++) {
        const step = steps[bin * points + point]
        const { slope, third } = step < 0 ? left : right
        changes[point] = step * (slope + step * (curvatures[bin] / 2 + (step * third) / 6))
        if (changes[point] > largest) largest = changes[point]
      }
      // Beside a spike η may fall by hundreds within a bin: the largest term is taken out before exp can overflow.
      let sum = 0
      for (let point = 0; point < points; point++) {
        sum += shares[bin * points + point] * Math.exp(changes[point] - largest)
      }
      const exact = exactLogs[bin]
      const effective = largest + Math.log(sum)
      result[bin] = Math.min(Math.max(effective, exact - LARGEST_CORRECTION), exact + LARGEST_CORRECTION)
    }
    return result
  }
}

function splineCurvatures(
  { midpoints, edges, period, mirrored }: BinGeometry,
  eta: Float64Array,
): Float64Array {
  if (period !== null) return periodicCurvatures(midpoints, eta, period)
  return mirrored
    ? mirroredCurvatures(midpoints, eta, edges[edges.length - 1])
    : notAKnotCurvatures(midpoints, eta)
}

/** Slope and third derivative of the spline at a knot, on the piece to its left (−1) or right (+1). */
function taylorTowards(
  geometry: BinGeometry,
  y: Float64Array,
  curvatures: Float64Array,
  knot: number,
  side: -1 | 1,
): { slope: number; third: number } {
  const { midpoints: x, edges, period, mirrored } = geometry
  const count = x.length
  // Towards its mirror image a knot stands on a parabola that is level at the mirror.
  if (mirrored && knot + side === count) {
    return { slope: -curvatures[knot] * (edges[count] - x[knot]), third: 0 }
  }
  let neighbour = knot + side
  let turn = 0
  if (neighbour < 0 || neighbour >= count) {
    // Without a period the piece on the inner side continues to the edge.
    if (period === null) return taylorTowards(geometry, y, curvatures, knot, side === 1 ? -1 : 1)
    neighbour = (neighbour + count) % count
    turn = side * period
  }
  const span = x[neighbour] + turn - x[knot]
  const third = (curvatures[neighbour] - curvatures[knot]) / span
  return {
    slope: (y[neighbour] - y[knot]) / span - span * (curvatures[knot] / 2 + (third * span) / 6),
    third,
  }
}
