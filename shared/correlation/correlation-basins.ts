import { type BasinCurve, type BasinThreshold, type GridBasin, gridBasins, type GridBasins } from '../basins'
import { InvalidInputError } from '../errors'
import type { JointHistogram } from '../histogram/joint-histogram'
import { type BasinAxis, basinAxis } from './basin-axis'
import { mergeCells } from './merge-bins'
import type { Marginals } from './mutual-information'
import { smoothCoupling } from './smooth-coupling'

/** A basin of the map or of the product, and its like in the other. */
export interface MatchedBasin extends GridBasin {
  /** Place of the basin in the other list that stands for the same; null where the other has none. */
  readonly counterpart: number | null
}

/** Basins of one landscape. Energies in kT with one constant for both landscapes. */
export interface BasinsOfMap {
  /** Ascending energy. */
  readonly basins: readonly MatchedBasin[]
  /** Number of basins against depth. */
  readonly curve: BasinCurve
}

/**
 * Basins of −ln(n/V) of the joint counts against those of the product of the marginals. Only `mapOnly` speaks for a joint
 * potential: two separable double wells have four basins in both.
 */
export interface CorrelationBasins {
  /** kT: what basins were asked at, or twice the deviation of their depth where that is more. */
  readonly depth: number
  readonly threshold: BasinThreshold
  readonly map: BasinsOfMap
  readonly product: BasinsOfMap
  /** Basins of the map that the product lacks, and the reverse. */
  readonly mapOnly: number
  readonly productOnly: number
  /** The smooth landscapes, row-major, kT. */
  readonly xEdges: Float64Array
  readonly yEdges: Float64Array
  readonly mapEnergies: Float64Array
  readonly productEnergies: Float64Array
}

/**
 * Basins of the map and of the product of the marginals on one grid (methods §6). Both marginals are smoothed as an inversion
 * smooths them; the product is their sum, and the map that sum less the smooth coupling. Without a coupling the two are the
 * same to the last digit, so that noise of the marginals can never look like a basin that the product lacks. Both are asked
 * with the deviations of the map. A basin of the map has its counterpart where the product's basin holds its place; of several
 * in one, the one deepest in the product's.
 *
 * @param masses of the histogram, sum 1
 * @returns null where one coordinate has data in fewer than 5 cells, or the counts do not determine a smooth curve
 * @throws {InvalidInputError} SETTING_INVALID for a threshold below 0
 */
export function correlationBasins(
  { kinds, xEdges, yEdges }: JointHistogram,
  masses: Float64Array,
  marginals: Marginals,
  independentSamples: number,
  threshold: BasinThreshold,
): CorrelationBasins | null {
  const counted = (shares: Float64Array) => shares.map((share) => independentSamples * share)
  const x = smoothAxis(() => basinAxis(kinds[0], counted(marginals.x), xEdges))
  const y = smoothAxis(() => basinAxis(kinds[1], counted(marginals.y), yEdges))
  if (x === null || y === null) return null
  const counts = mergeCells(counted(masses), x, y)
  const coupling = smoothCoupling(counts, x, y)
  const overCells = (value: (ix: number, iy: number, cell: number) => number) =>
    counts.map((_, cell) => value(Math.floor(cell / y.count), cell % y.count, cell))
  const productEnergies = overCells((ix, iy) => x.energies[ix] + y.energies[iy])
  const mapEnergies = productEnergies.map((energy, cell) => energy - coupling.values[cell])
  const shared = {
    x: x.midpoints,
    y: y.midpoints,
    periodic: [x.periodic, y.periodic] as const,
    deviations: overCells((ix, iy, cell) =>
      Math.hypot(x.deviations[ix], y.deviations[iy], coupling.deviations[cell]),
    ),
  }
  const productMasses = overCells((ix, iy) => x.counts[ix] * y.counts[iy])
  const map = gridBasins({ ...shared, energies: mapEnergies, masses: counts }, threshold)
  const product = gridBasins({ ...shared, energies: productEnergies, masses: productMasses }, threshold)
  const counterparts = matchBasins(map, product, productEnergies)
  const matched = counterparts.filter((place) => place !== null)
  return {
    depth: threshold.depth,
    threshold,
    map: withCounterparts(map, (index) => counterparts[index]),
    product: withCounterparts(product, (index) => place(counterparts.indexOf(index))),
    mapOnly: map.basins.length - matched.length,
    productOnly: product.basins.length - matched.length,
    xEdges: x.edges,
    yEdges: y.edges,
    mapEnergies,
    productEnergies,
  }
}

const place = (index: number) => (index < 0 ? null : index)

/** A coordinate whose counts do not determine a curve has no basins to speak of. */
function smoothAxis(smooth: () => BasinAxis | null): BasinAxis | null {
  try {
    return smooth()
  } catch (error) {
    if (error instanceof InvalidInputError && error.code === 'SINGULAR_SYSTEM') return null
    throw error
  }
}

/** For each basin of the map the basin of the product that holds its place, given to one of the map's only. */
function matchBasins(map: GridBasins, product: GridBasins, energies: Float64Array): (number | null)[] {
  const counterparts = map.basins.map((): number | null => null)
  const order = Array.from(map.basins.keys()).sort(
    (one, other) => energies[map.basins[one].cell] - energies[map.basins[other].cell],
  )
  for (const index of order) {
    const owner = product.owners[map.basins[index].cell]
    if (!counterparts.includes(owner)) counterparts[index] = owner
  }
  return counterparts
}

function withCounterparts(
  { basins, curve }: GridBasins,
  counterpartOf: (index: number) => number | null,
): BasinsOfMap {
  return { basins: basins.map((basin, index) => ({ ...basin, counterpart: counterpartOf(index) })), curve }
}
