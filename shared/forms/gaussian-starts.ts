import { expectationMaximisation, type MixtureComponent, type PointDensity } from './expectation-maximisation'
import type { LikelihoodCells } from './likelihood-cells'

/** Widths stay above this share of a bin while the start is sought. */
const LEAST_WIDTH = 0.5

/**
 * Starts for a sum of Gaussians in p/J, each improved by expectation–maximisation (Dempster, Laird, Rubin, J. R. Stat. Soc. B
 * 39 (1977) 1): centres at equal shares of p/J; and, where the fit with one Gaussian less is known, that fit with its
 * heaviest Gaussian split in two and with a narrow one added where the data exceed it most.
 *
 * @returns β as `gaussianShape` lays it out; equal for equal input
 */
export function mixtureStarts(
  cells: LikelihoodCells,
  terms: number,
  smaller: readonly MixtureComponent[] | null,
): Float64Array[] {
  const density = densityOf(cells)
  const starts = [atEqualShares(density, terms)]
  if (smaller !== null && terms > 1) starts.push(withHeaviestSplit(smaller), withExcess(smaller, density))
  const least = (LEAST_WIDTH * (cells.edges[1] - cells.edges[0])) / cells.deviation
  return starts.map((start) => layOut(expectationMaximisation(start, density, least)))
}

function densityOf({
  shares,
  bins: [first],
  edges,
  volumes,
  mean,
  deviation,
}: LikelihoodCells): PointDensity {
  const places: number[] = []
  const masses: number[] = []
  for (let bin = 0; bin < volumes.length; bin++) {
    const share = shares[first + bin]
    if (!(share > 0 && volumes[bin] > 0)) continue
    places.push(((edges[bin] + edges[bin + 1]) / 2 - mean) / deviation)
    masses.push((share * (edges[bin + 1] - edges[bin])) / volumes[bin])
  }
  const total = masses.reduce((sum, mass) => sum + mass, 0)
  return { places: Float64Array.from(places), masses: Float64Array.from(masses, (mass) => mass / total) }
}

function atEqualShares({ places, masses }: PointDensity, terms: number): MixtureComponent[] {
  let mean = 0
  let square = 0
  for (let bin = 0; bin < places.length; bin++) mean += masses[bin] * places[bin]
  for (let bin = 0; bin < places.length; bin++) square += masses[bin] * (places[bin] - mean) ** 2
  const components: MixtureComponent[] = []
  let reached = 0
  for (let bin = 0; bin < places.length; bin++) {
    reached += masses[bin]
    while (components.length < terms && reached >= (components.length + 0.5) / terms) {
      components.push({ weight: 1 / terms, centre: places[bin], width: Math.sqrt(square) / terms })
    }
  }
  return components
}

function withHeaviestSplit(smaller: readonly MixtureComponent[]): MixtureComponent[] {
  const heaviest = smaller.reduce((one, other) => (other.weight > one.weight ? other : one))
  const halves = [-1, 1].map((side) => ({
    weight: heaviest.weight / 2,
    centre: heaviest.centre + 0.7 * side * heaviest.width,
    width: 0.7 * heaviest.width,
  }))
  return [...smaller.filter((one) => one !== heaviest), ...halves]
}

function withExcess(
  smaller: readonly MixtureComponent[],
  { places, masses }: PointDensity,
): MixtureComponent[] {
  const widths = smaller.map(({ width }) => width)
  let [place, most] = [0, -Infinity]
  const spacing = (places[places.length - 1] - places[0]) / places.length
  for (let bin = 0; bin < places.length; bin++) {
    const modelled = smaller.reduce((sum, one) => sum + gaussian(one, places[bin]), 0) * spacing
    if (masses[bin] - modelled > most) [place, most] = [places[bin], masses[bin] - modelled]
  }
  const added = { weight: 0.2, centre: place, width: 0.4 * Math.min(...widths) }
  return [...smaller.map((one) => ({ ...one, weight: 0.8 * one.weight })), added]
}

function gaussian({ weight, centre, width }: MixtureComponent, place: number): number {
  return ((weight / width) * Math.exp(-0.5 * ((place - centre) / width) ** 2)) / Math.sqrt(2 * Math.PI)
}

function layOut(components: readonly MixtureComponent[]): Float64Array {
  const first = Math.log(components[0].weight)
  return Float64Array.from([
    ...components.map(({ centre }) => centre),
    ...components.map(({ width }) => Math.log(width)),
    ...components.slice(1).map(({ weight }) => Math.log(weight) - first),
  ])
}
