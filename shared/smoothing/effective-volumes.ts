import { GAUSS_LEGENDRE, notAKnotCurvatures, periodicCurvatures } from '../numeric'

/** Jacobian and geometry of the bins that effective volumes are taken over. */
export interface BinGeometry {
  /** Ascending, length n + 1. */
  readonly edges: Float64Array
  readonly midpoints: Float64Array
  /** Exact volumes ∫ J dq; 0 for a bin that was not observed. */
  readonly volumes: Float64Array
  readonly jacobian: (coordinate: number) => number
  /** 2π when the bins fill a turn, else null. */
  readonly period: number | null
}

/**
 * Prepares the effective volumes ∫_bin J(q) exp(η(q) − η(m)) dq about the midpoints m of bins, by Gauss–Legendre with five
 * points. With them as offset a bin is what it is, an average of exp η and not its value at one point (composite link:
 * Thompson & Baker, Appl. Stat. 30 (1981) 125; Eilers, Stat. Model. 7 (2007) 239); what is left of the bin-width error is
 * of fourth order.
 *
 * @param geometry at least 4 bins
 * @returns function from η at the midpoints to the effective volumes; η between midpoints is a cubic spline
 */
export function effectiveVolumes(geometry: BinGeometry): (eta: Float64Array) => Float64Array {
  const { edges, midpoints, volumes, jacobian, period } = geometry
  const bins = midpoints.length
  const points = GAUSS_LEGENDRE.length
  const shares = new Float64Array(bins * points)
  const steps = new Float64Array(bins * points)
  for (let bin = 0; bin < bins; bin++) {
    const half = (edges[bin + 1] - edges[bin]) / 2
    GAUSS_LEGENDRE.forEach(({ node, weight }, point) => {
      steps[bin * points + point] = node * half
      shares[bin * points + point] =
        volumes[bin] === 0 ? 0 : weight * half * jacobian(midpoints[bin] + node * half)
    })
  }
  return (eta) => {
    const curvatures =
      period === null ? notAKnotCurvatures(midpoints, eta) : periodicCurvatures(midpoints, eta, period)
    const result = new Float64Array(bins)
    for (let bin = 0; bin < bins; bin++) {
      const left = taylorTowards(midpoints, eta, curvatures, period, bin, -1)
      const right = taylorTowards(midpoints, eta, curvatures, period, bin, 1)
      let sum = 0
      for (let point = 0; point < points; point++) {
        const index = bin * points + point
        if (shares[index] === 0) continue
        const step = steps[index]
        const { slope, third } = step < 0 ? left : right
        const change = step * (slope + step * (curvatures[bin] / 2 + (step * third) / 6))
        sum += shares[index] * Math.exp(change)
      }
      result[bin] = sum
    }
    return result
  }
}

/** Slope and third derivative of the spline at a knot, on the piece to its left (−1) or right (+1). */
function taylorTowards(
  x: Float64Array,
  y: Float64Array,
  curvatures: Float64Array,
  period: number | null,
  knot: number,
  side: -1 | 1,
): { slope: number; third: number } {
  const count = x.length
  let neighbour = knot + side
  let turn = 0
  if (neighbour < 0 || neighbour >= count) {
    // Without a period the piece on the inner side continues to the edge.
    if (period === null) return taylorTowards(x, y, curvatures, period, knot, side === 1 ? -1 : 1)
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
