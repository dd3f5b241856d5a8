import type { CouplingMap, LargestCoupling } from './correlation'
import { mergeBins, mergeCells } from './merge-bins'
import { marginalsOf } from './mutual-information'
import type { Marginals } from './mutual-information'

/** Thin bins are merged until a cell expects about this many independent samples, so that it is known to 0.2 kT. */
const EXPECTED_AIM = 25

/** Below this many expected samples a cell says nothing. */
const EXPECTED_LEAST = 10

/** Without a sample size: cells where the product of the marginals is below this share of its peak are left out. */
const LEAST_SHARE_OF_PEAK = 0.01

/**
 * ln[p₁₂/(p₁p₂)] in kT, on the file's bins where these are filled well enough, and on merged ones where they are not.
 *
 * @param masses sum 1, row-major
 * @param marginals of the masses
 * @param independentSamples null when unknown: then nothing is merged and no deviation known
 */
export function couplingMap(
  masses: Float64Array,
  marginals: Marginals,
  xEdges: Float64Array,
  yEdges: Float64Array,
  independentSamples: number | null,
): CouplingMap {
  if (independentSamples === null) return withoutSampleSize(masses, marginals, xEdges, yEdges)
  const side = Math.max(2, Math.floor(Math.sqrt(independentSamples / EXPECTED_AIM)))
  const x = mergeBins(marginals.x, xEdges, side)
  const y = mergeBins(marginals.y, yEdges, side)
  const cells = mergeCells(masses, x, y)
  const merged = marginalsOf(cells, y.count)
  const values = new Float64Array(cells.length).fill(NaN)
  const deviations = new Float64Array(cells.length).fill(NaN)
  cells.forEach((mass, cell) => {
    const product = merged.x[Math.floor(cell / y.count)] * merged.y[cell % y.count]
    if (independentSamples * product < EXPECTED_LEAST) return
    const seen = mass > 0 ? mass : 0.5 / independentSamples
    values[cell] = Math.log(seen / product)
    deviations[cell] = 1 / Math.sqrt(independentSamples * seen)
  })
  return { xEdges: x.edges, yEdges: y.edges, values, deviations }
}

function withoutSampleSize(
  masses: Float64Array,
  { x, y }: Marginals,
  xEdges: Float64Array,
  yEdges: Float64Array,
): CouplingMap {
  const ny = y.length
  const area = (cell: number) => {
    const ix = Math.floor(cell / ny)
    return (xEdges[ix + 1] - xEdges[ix]) * (yEdges[(cell % ny) + 1] - yEdges[cell % ny])
  }
  const products = masses.map((_, cell) => x[Math.floor(cell / ny)] * y[cell % ny])
  const peak = products.reduce((most, product, cell) => Math.max(most, product / area(cell)), 0)
  const values = masses.map((mass, cell) => {
    const thin = products[cell] / area(cell) < LEAST_SHARE_OF_PEAK * peak
    return thin || mass === 0 ? NaN : Math.log(mass / products[cell])
  })
  return { xEdges, yEdges, values, deviations: new Float64Array(values.length).fill(NaN) }
}

/** The cell with the largest |coupling|; null when the map is empty. */
export function largestCoupling({ xEdges, yEdges, values, deviations }: CouplingMap): LargestCoupling | null {
  const ny = yEdges.length - 1
  let largest = -1
  values.forEach((value, cell) => {
    if (Number.isNaN(value)) return
    if (largest < 0 || Math.abs(value) > Math.abs(values[largest])) largest = cell
  })
  if (largest < 0) return null
  const [ix, iy] = [Math.floor(largest / ny), largest % ny]
  return {
    value: values[largest],
    deviation: Number.isNaN(deviations[largest]) ? null : deviations[largest],
    x: (xEdges[ix] + xEdges[ix + 1]) / 2,
    y: (yEdges[iy] + yEdges[iy + 1]) / 2,
  }
}
