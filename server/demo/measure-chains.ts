import type { CoordinateKind } from '../../shared/histogram/histogram'
import { createRandom } from '../../shared/numeric/random'
import { thermalEnergy } from '../../shared/units'
import { createChain, createChainModel, type ModelBead, type UnitPositions } from './chain-model'
import { angleOf, dihedralOf, distanceOf, type Point } from './geometry'

/** A place along the chain: beads of the model with their unit, counted from any unit that has all of them. */
export type ModelPlace = readonly { readonly bead: ModelBead; readonly unit: number }[]

/** What to measure: the places pooled in one term. */
export interface MeasuredTerm {
  readonly kind: CoordinateKind
  readonly places: readonly ModelPlace[]
}

/** A bond and another term measured together: the i-th place of one with the i-th of the other. */
export interface MeasuredPair {
  readonly first: MeasuredTerm
  readonly second: MeasuredTerm
  /** Width of the first one's bins in nm: a joint map wants fewer and wider ones than a distribution alone. */
  readonly bondWidth: number
}

/** How many chains are followed, and for how long. */
export interface Ensemble {
  readonly chains: number
  readonly frames: number
  readonly units: number
}

/** Counts in bins of equal width from the lower end of the coordinate's domain; one row per chain. */
export interface ChainCounts {
  readonly kind: CoordinateKind
  readonly low: number
  readonly width: number
  readonly perChain: readonly Float64Array[]
}

/** Counts of two coordinates, row-major; one row of cells per chain. */
export interface PairCounts {
  readonly bins: readonly [number, number]
  readonly lows: readonly [number, number]
  readonly widths: readonly [number, number]
  readonly perChain: readonly Float64Array[]
}

/** Enough for error bars of some hundredths of kT where the chain mostly is, and for bins without counts further out. */
export const DEMO_ENSEMBLE: Ensemble = { chains: 100, frames: 24, units: 12 }

const degree = Math.PI / 180

/** Bins of the invented files: nm and rad. Bonds end at 1 nm, which no draw of the model reaches. */
const BINS = {
  bond: { low: 0, width: 0.002, count: 500 },
  angle: { low: 0, width: 2 * degree, count: 90 },
  dihedral: { low: -Math.PI, width: 5 * degree, count: 72 },
} as const satisfies Record<CoordinateKind, { low: number; width: number; count: number }>

/**
 * Follows the invented chains at one temperature and counts every term and pair.
 *
 * @param temperature in K
 * @param seed everything follows from it
 */
export function measureChains(
  temperature: number,
  terms: readonly MeasuredTerm[],
  pairs: readonly MeasuredPair[],
  ensemble: Ensemble,
  seed: number,
): { readonly terms: readonly ChainCounts[]; readonly pairs: readonly PairCounts[] } {
  const random = createRandom(seed)
  const model = createChainModel(thermalEnergy(temperature))
  const counted = terms.map(({ kind }) => emptyChainCounts(kind, ensemble.chains))
  const countedPairs = pairs.map((pair) => emptyPairCounts(pair, ensemble.chains))
  for (let index = 0; index < ensemble.chains; index++) {
    const chain = createChain(model, ensemble.units, random)
    for (let frame = 0; frame < ensemble.frames; frame++) {
      const positions = chain.nextFrame()
      terms.forEach((term, i) => countTerm(term, positions, counted[i], index))
      pairs.forEach((pair, i) => countPair(pair, positions, countedPairs[i], index))
    }
  }
  return { terms: counted, pairs: countedPairs }
}

function emptyChainCounts(kind: CoordinateKind, chains: number): ChainCounts {
  const { low, width, count } = BINS[kind]
  return { kind, low, width, perChain: Array.from({ length: chains }, () => new Float64Array(count)) }
}

function emptyPairCounts({ second, bondWidth }: MeasuredPair, chains: number): PairCounts {
  const { low, width, count } = BINS.bond
  const x = { low, width: bondWidth, count: Math.ceil((count * width) / bondWidth) }
  const y = BINS[second.kind]
  return {
    bins: [x.count, y.count],
    lows: [x.low, y.low],
    widths: [x.width, y.width],
    perChain: Array.from({ length: chains }, () => new Float64Array(x.count * y.count)),
  }
}

function countTerm(
  term: MeasuredTerm,
  positions: readonly UnitPositions[],
  counted: ChainCounts,
  chain: number,
) {
  const row = counted.perChain[chain]
  for (const place of term.places) {
    for (let unit = 0; unit < positions.length; unit++) {
      const points = pointsAt(place, positions, unit)
      if (points !== null) row[binOf(measure(points), counted.low, counted.width, row.length)]++
    }
  }
}

function countPair(
  pair: MeasuredPair,
  positions: readonly UnitPositions[],
  counted: PairCounts,
  chain: number,
) {
  const row = counted.perChain[chain]
  const [nx, ny] = counted.bins
  pair.first.places.forEach((place, i) => {
    for (let unit = 0; unit < positions.length; unit++) {
      const first = pointsAt(place, positions, unit)
      const second = pointsAt(pair.second.places[i], positions, unit)
      if (first === null || second === null) continue
      const x = binOf(measure(first), counted.lows[0], counted.widths[0], nx)
      const y = binOf(measure(second), counted.lows[1], counted.widths[1], ny)
      row[x * ny + y]++
    }
  })
}

/** The beads of a place, its unit 0 laid on `unit`; null where the chain has ended or the unit has no such bead. */
function pointsAt(place: ModelPlace, positions: readonly UnitPositions[], unit: number): Point[] | null {
  const points: Point[] = []
  for (const site of place) {
    const point = positions[unit + site.unit]?.[site.bead]
    if (point === undefined) return null
    points.push(point)
  }
  return points
}

function measure(points: readonly Point[]): number {
  const [a, b, c, d] = points
  if (points.length === 2) return distanceOf(a, b)
  return points.length === 3 ? angleOf(a, b, c) : dihedralOf(a, b, c, d)
}

/** Half-open bins, the last one closed. */
function binOf(value: number, low: number, width: number, count: number): number {
  return Math.min(count - 1, Math.floor((value - low) / width))
}
