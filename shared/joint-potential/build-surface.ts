import { coordinateDomain, foldDihedral } from '../histogram'
import type { SmoothJointDensity } from '../smoothing'
import { thermalEnergy } from '../units'
import { holdUp } from './hold-up'
import type { JointAxisBins, JointBins } from './joint-bins'
import { type JointAxis, jointEnergy, type JointSurface } from './joint-surface'

/** Beyond its data a surface bends at least by this share of kT/σ², the stiffness of a spring with the spread of the data. */
const LEAST_STIFFNESS = 0.5
/** A surface that still falls at the end of its bins turns within its last splines, so many segments beyond. */
const SEARCH_BEYOND = 3
/** The least value is looked for on a grid of so many points a side, which then shrinks by this factor so many times. */
const SEARCH_POINTS = 9
const SEARCH_SHRINK = 4
const SEARCH_ROUNDS = 13

/** Where a surface is least. */
export interface SurfacePoint {
  readonly x: number
  readonly y: number
  /** kJ/mol */
  readonly energy: number
}

/**
 * Makes the potential U = −kT η of a smooth density: held up beyond its data, with least value 0.
 *
 * @returns the surface, and where it is least
 */
export function buildSurface(
  bins: JointBins,
  density: SmoothJointDensity,
  temperature: number,
): { surface: JointSurface; minimum: SurfacePoint } {
  const kT = thermalEnergy(temperature)
  const axis = (place: 0 | 1): JointAxis => {
    const { low, segment, size, periodic } = density.axes[place]
    const { kind, alone } = bins.axes[place]
    const leastBend = (LEAST_STIFFNESS * kT * segment * segment) / varianceOf(bins.axes[place])
    const [first, last] = alone.filled
    return {
      kind,
      low,
      segment,
      size,
      periodic,
      populated: [alone.edges[first], alone.edges[last + 1]],
      leastBend,
    }
  }
  const axes: JointSurface['axes'] = [axis(0), axis(1)]
  const energies = density.coefficients.map((coefficient) => -kT * coefficient)
  const surface = { temperature, axes, coefficients: holdUp(axes, energies, density.support) }
  const minimum = leastPoint(surface, bins)
  return {
    surface: { ...surface, coefficients: surface.coefficients.map((value) => value - minimum.energy) },
    minimum: { ...minimum, energy: 0 },
  }
}

/** Variance of the coordinate, with the weight of each bin at its midpoint. */
function varianceOf({ alone: { counts, midpoints } }: JointAxisBins): number {
  const total = counts.reduce((sum, count) => sum + count, 0)
  const mean = counts.reduce((sum, count, bin) => sum + count * midpoints[bin], 0) / total
  return counts.reduce((sum, count, bin) => sum + count * (midpoints[bin] - mean) ** 2, 0) / total
}

/** The lowest of all midpoints and corners of the fitted cells and those beside them, then ever finer grids around it. */
function leastPoint(surface: JointSurface, { axes: [x, y] }: JointBins): SurfacePoint {
  const [xPlaces, yPlaces] = [placesOf(surface.axes[0], x), placesOf(surface.axes[1], y)]
  let best = lowest(surface, xPlaces, yPlaces)
  let reach = [widest(xPlaces), widest(yPlaces)]
  for (let round = 0; round < SEARCH_ROUNDS; round++) {
    const finer = lowest(
      surface,
      around(xPlaces, surface.axes[0], best.x, reach[0]),
      around(yPlaces, surface.axes[1], best.y, reach[1]),
    )
    if (finer.energy < best.energy) best = finer
    reach = reach.map((length) => length / SEARCH_SHRINK)
  }
  return best
}

/** Ascending; inside the domain of the kind. */
function placesOf({ kind, segment, periodic }: JointAxis, { geometry }: JointAxisBins): number[] {
  const { edges, midpoints } = geometry
  const [low, high] = coordinateDomain(kind)
  const halves = periodic
    ? []
    : Array.from({ length: 2 * SEARCH_BEYOND }, (_, half) => (half + 1) * 0.5 * segment)
  const below = halves.map((distance) => Math.max(low, edges[0] - distance))
  const above = halves.map((distance) => Math.min(high, edges[edges.length - 1] + distance))
  return [...new Set([...edges, ...midpoints, ...below, ...above])].sort((one, other) => one - other)
}

function widest(places: readonly number[]): number {
  return places.reduce(
    (most, place, index) => (index === 0 ? 0 : Math.max(most, place - places[index - 1])),
    0,
  )
}

function around(places: readonly number[], { periodic }: JointAxis, centre: number, reach: number): number[] {
  const half = (SEARCH_POINTS - 1) / 2
  const [low, high] = [places[0], places[places.length - 1]]
  return Array.from({ length: SEARCH_POINTS }, (_, point) => {
    const place = centre + ((point - half) / half) * reach
    return periodic ? foldDihedral(place) : Math.min(Math.max(place, low), high)
  })
}

function lowest(surface: JointSurface, xs: readonly number[], ys: readonly number[]): SurfacePoint {
  let best: SurfacePoint = { x: NaN, y: NaN, energy: Infinity }
  for (const x of xs) {
    for (const y of ys) {
      const energy = jointEnergy(surface, x, y)
      if (energy < best.energy) best = { x, y, energy }
    }
  }
  return best
}
