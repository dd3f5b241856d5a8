import { binMidpoints } from '../histogram'
import type { CoordinateKind } from '../histogram/histogram'
import type { ConditionalMean } from './correlation'
import { marginalsOf } from './mutual-information'

interface Spread {
  mean: number
  deviation: number
  /** Standard error of the mean of one sample; divided by √n it is that of n. */
  errorOfOne: number
}

/**
 * Mean of the second coordinate in each bin of the first that holds something. Bins count at their midpoints, and their
 * own width is part of the spread. For a dihedral the mean is the mean direction and its error follows from the circular
 * dispersion (1 − ρ₂)/(2ρ₁²) (Fisher, Statistical Analysis of Circular Data, 1993, §4.4).
 *
 * @param yKind kind of the second coordinate
 * @param masses sum 1, row-major
 * @param independentSamples null when unknown: then counts and errors are null
 */
export function conditionalMeans(
  yKind: CoordinateKind,
  masses: Float64Array,
  xEdges: Float64Array,
  yEdges: Float64Array,
  independentSamples: number | null,
): ConditionalMean[] {
  const ny = yEdges.length - 1
  const middles = binMidpoints(xEdges)
  const spreadOf = yKind === 'dihedral' ? circularSpread : linearSpread
  const means: ConditionalMean[] = []
  marginalsOf(masses, ny).x.forEach((mass, ix) => {
    if (mass === 0) return
    const row = masses.subarray(ix * ny, (ix + 1) * ny).map((cell) => cell / mass)
    const { mean, deviation, errorOfOne } = spreadOf(row, yEdges)
    const count = independentSamples === null ? null : independentSamples * mass
    // One sample has a mean but says nothing about its error.
    const error = count === null || count < 2 ? null : errorOfOne / Math.sqrt(count - 1)
    means.push({ x: middles[ix], mean, deviation, error, count })
  })
  return means
}

function linearSpread(row: Float64Array, edges: Float64Array): Spread {
  const middles = binMidpoints(edges)
  let mean = 0
  row.forEach((share, bin) => (mean += share * middles[bin]))
  let variance = 0
  row.forEach((share, bin) => {
    const width = edges[bin + 1] - edges[bin]
    variance += share * ((middles[bin] - mean) ** 2 + (width * width) / 12)
  })
  const deviation = Math.sqrt(variance)
  return { mean, deviation, errorOfOne: deviation }
}

function circularSpread(row: Float64Array, edges: Float64Array): Spread {
  const mean = Math.atan2(moment(row, edges, Math.sin, 1, 0), moment(row, edges, Math.cos, 1, 0))
  const first = moment(row, edges, Math.cos, 1, mean)
  const second = moment(row, edges, Math.cos, 2, mean)
  return {
    mean,
    deviation: Math.sqrt(-2 * Math.log(first)),
    errorOfOne: Math.sqrt(Math.max(0, 1 - second) / 2) / first,
  }
}

/** ⟨f(k(φ − μ))⟩ with the mass of each bin spread evenly over it. */
function moment(
  row: Float64Array,
  edges: Float64Array,
  wave: (angle: number) => number,
  order: number,
  centre: number,
): number {
  let sum = 0
  row.forEach((share, bin) => {
    if (share === 0) return
    const half = (order * (edges[bin + 1] - edges[bin])) / 2
    sum += share * wave(order * ((edges[bin] + edges[bin + 1]) / 2 - centre)) * (Math.sin(half) / half)
  })
  return sum
}
