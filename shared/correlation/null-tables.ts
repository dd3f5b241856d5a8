import { createRandom } from '../numeric/random'
import { quantileSorted } from '../numeric/quantile'
import { marginalsOf, mutualInformation, totalVariation } from './mutual-information'
import { fillRandomTable, wholeMargins } from './random-table'

/** Number of tables with the same margins that the measured one is held against. */
export const NULL_TABLES = 200

/**
 * More independent samples than this are drawn as this many, and what they show is scaled down: mutual information by
 * N and total variation by √N, which are exact in the limit that a million samples on 1,600 cells have long reached.
 */
const MOST_DRAWN = 1_000_000

/** What independent coordinates with the same margins and sample size show of a mutual information. */
export interface NullDistribution {
  readonly mean: number
  readonly percentile99: number
  /** (1 + number of tables that reach the measured value) / (1 + number of tables). */
  readonly pValue: number
  readonly totalVariationMean: number
}

/**
 * Draws tables with the margins of the measured one and its number of independent samples, and says where the measured
 * mutual information stands among theirs.
 *
 * @param cells masses, row-major
 * @param ny cells in a row
 * @param independentSamples at least 1
 * @param seed as for `createRandom`
 */
export function nullDistribution(
  cells: Float64Array,
  ny: number,
  independentSamples: number,
  seed: number,
): NullDistribution {
  const random = createRandom(seed)
  const drawn = Math.round(Math.min(independentSamples, MOST_DRAWN))
  const shrink = drawn / independentSamples
  const margins = marginalsOf(cells, ny)
  const x = wholeMargins(margins.x, drawn)
  const y = wholeMargins(margins.y, drawn)
  const table = new Float64Array(cells.length)
  const informations = new Float64Array(NULL_TABLES)
  let variations = 0
  for (let index = 0; index < NULL_TABLES; index++) {
    fillRandomTable(random, x, y, table)
    informations[index] = shrink * mutualInformation(table, ny)
    variations += Math.sqrt(shrink) * totalVariation(table, ny)
  }
  // A table that ties with the measured one may miss it by the rounding of a sum.
  const measured = mutualInformation(cells, ny) - 1e-12
  const reaching = informations.reduce((count, value) => count + (value >= measured ? 1 : 0), 0)
  return {
    mean: informations.reduce((sum, value) => sum + value, 0) / NULL_TABLES,
    percentile99: quantileSorted(informations.sort(), 0.99),
    pValue: (1 + reaching) / (1 + NULL_TABLES),
    totalVariationMean: variations / NULL_TABLES,
  }
}
