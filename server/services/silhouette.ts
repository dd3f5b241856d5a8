import { coordinateDomain, type Histogram } from '../../shared/histogram'

const POINTS = 40

/** Room on either side of the filled bins, as a share of their extent. */
const MARGIN = 0.08

/**
 * The outline of a histogram for the rail: its density at 40 places over the filled range, the largest being 1.
 *
 * @returns length 40, each in [0, 1]
 */
export function measuredSilhouette(histogram: Histogram): number[] {
  const masses = outline(histogram, histogram.weights)
  const most = largest(masses)
  return Array.from(masses, (mass) => round(mass / most))
}

/**
 * The outline of the distribution that a potential regenerates, on the range and at the scale of the measured one.
 *
 * @param regenerated probability mass of each bin, sum 1
 * @returns length 40, each in [0, 1]; a peak above the measured one is cut at 1
 */
export function derivedSilhouette(regenerated: Float64Array, histogram: Histogram): number[] {
  const total = histogram.weights.reduce((sum, weight) => sum + weight, 0)
  const most = largest(outline(histogram, histogram.weights)) / total
  return Array.from(outline(histogram, regenerated), (mass) => round(Math.min(1, mass / most)))
}

/** What lies in each of 40 equal parts of the filled range, each bin spread evenly. */
function outline(histogram: Histogram, weights: Float64Array): Float64Array {
  const { edges } = histogram
  const [low, high] = silhouetteRange(histogram)
  const width = (high - low) / POINTS
  const masses = new Float64Array(POINTS)
  for (let bin = 0; bin < weights.length; bin++) {
    const density = weights[bin] / (edges[bin + 1] - edges[bin])
    const first = Math.max(0, Math.floor((edges[bin] - low) / width))
    for (let point = first; point < POINTS && low + point * width < edges[bin + 1]; point++) {
      const from = Math.max(edges[bin], low + point * width)
      const to = Math.min(edges[bin + 1], low + (point + 1) * width)
      if (to > from) masses[point] += density * (to - from)
    }
  }
  return masses
}

function largest(masses: Float64Array): number {
  return masses.reduce((most, mass) => Math.max(most, mass), 0)
}

/** From the first to the last filled bin with a margin, within the domain; a whole turn for a dihedral. */
function silhouetteRange({ kind, edges, weights }: Histogram): [number, number] {
  const [least, most] = coordinateDomain(kind)
  if (kind === 'dihedral') return [least, most]
  const first = weights.findIndex((weight) => weight > 0)
  const last = weights.findLastIndex((weight) => weight > 0)
  const margin = MARGIN * (edges[last + 1] - edges[first])
  return [Math.max(least, edges[first] - margin), Math.min(most, edges[last + 1] + margin)]
}

/** Three digits are finer than a pixel of the rail. */
function round(value: number): number {
  return Math.round(value * 1000) / 1000
}
