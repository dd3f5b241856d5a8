import { createRandom } from '../numeric/random'
import { quantileSorted } from '../numeric/quantile'
import { marginalsOf, mutualInformation } from './mutual-information'
import { fillRandomTable, wholeMargins } from './random-table'

/** Number of tables with the same margins that the measured one is held against. */
export const NULL_TABLES = 200

/**
 * More independent samples than this are drawn as this many, and what they show is scaled down: mutual information by
 * N and total variation by √N. Both are exact in the limit of well-filled cells; 100,000 samples put 62 into each of 1,600
 * cells on average, and the mean of the null tables comes out within 1 % of itself.
 */
const MOST_DRAWN = 100_000

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
  const measures = measuresOf(x, y, drawn)
  const table = new Float64Array(cells.length)
  const informations = new Float64Array(NULL_TABLES)
  let variations = 0
  for (let index = 0; index < NULL_TABLES; index++) {
    fillRandomTable(random, x, y, table)
    const { information, variation } = measures(table)
    informations[index] = shrink * information
    variations += Math.sqrt(shrink) * variation
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

/**
 * Mutual information and total variation of tables of whole counts whose margins are all the same, so that what depends on the
 * margins alone is worked out once: I = [Σ n ln n − Σ x ln x − Σ y ln y]/N + ln N.
 */
function measuresOf(
  x: Float64Array,
  y: Float64Array,
  total: number,
): (table: Float64Array) => { readonly information: number; readonly variation: number } {
  // A cell holds no more than its row: n ln n is looked up.
  const products = Float64Array.from({ length: Math.max(...x) + 1 }, (_, n) => n * Math.log(Math.max(n, 1)))
  const ofMargins = [...x, ...y].reduce((sum, count) => sum + count * Math.log(Math.max(count, 1)), 0)
  const expected = new Float64Array(x.length * y.length)
  expected.forEach((_, cell) => {
    expected[cell] = (x[Math.floor(cell / y.length)] * y[cell % y.length]) / total
  })
  return (table) => {
    let sum = 0
    let distance = 0
    for (let cell = 0; cell < table.length; cell++) {
      sum += products[table[cell]]
      distance += Math.abs(table[cell] - expected[cell])
    }
    return { information: (sum - ofMargins) / total + Math.log(total), variation: distance / (2 * total) }
  }
}
