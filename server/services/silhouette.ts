import { coordinateDomain, type Histogram } from '../../shared/histogram'
import { type Potential, potentialEnergy } from '../../shared/inversion'
import { thermalEnergy } from '../../shared/units'

const POINTS = 40

/** Room on either side of the filled bins, as a share of their extent. */
const MARGIN = 0.08

/** A potential reaches the top of its silhouette at this many kT: beyond, a rail has nothing to tell. */
const CEILING = 8

/**
 * The outline of a histogram for the rail: its density at 40 places over the filled range, the largest being 1.
 *
 * @returns length 40, each in [0, 1]
 */
export function measuredSilhouette(histogram: Histogram): number[] {
  const { edges, weights } = histogram
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
  const most = masses.reduce((largest, mass) => Math.max(largest, mass), 0)
  return Array.from(masses, (mass) => round(mass / most))
}

/**
 * The outline of a potential on the range of its histogram: 0 at the minimum, 1 at 8 kT and above.
 *
 * @returns length 40, each in [0, 1]
 */
export function derivedSilhouette(potential: Potential, histogram: Histogram): number[] {
  const [low, high] = silhouetteRange(histogram)
  const ceiling = CEILING * thermalEnergy(potential.temperature)
  return Array.from({ length: POINTS }, (_, point) => {
    const coordinate = low + ((point + 0.5) / POINTS) * (high - low)
    return round(Math.min(1, Math.max(0, potentialEnergy(potential, coordinate) / ceiling)))
  })
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
