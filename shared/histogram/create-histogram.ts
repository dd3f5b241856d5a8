import { InvalidInputError } from '../errors'
import type { CoordinateKind } from '../units'
import { checkEdges } from './check-edges'
import type { BlockInefficiency } from './block-inefficiency'
import type { BinContent, Histogram } from './histogram'

/** What `createHistogram` is given; arrays are copied. */
export interface HistogramInput {
  readonly kind: CoordinateKind
  readonly edges: ArrayLike<number>
  /** As `content` says: counts, density per nm or rad, or probability of each bin (any common factor). */
  readonly weights: ArrayLike<number>
  readonly content: BinContent
  readonly independentSamples?: number | null
  readonly blocks?: BlockInefficiency | null
}

/**
 * Makes a histogram: the one door through which bins enter the core. Densities and probabilities become the probability
 * mass of each bin with sum 1; counts stay as they are and need not be whole (weighted or averaged runs).
 *
 * @returns immutable record with copies of the arrays
 * @throws {InvalidInputError} as `checkEdges`; LENGTH_MISMATCH when there is not one weight per bin; NUMBER_NOT_FINITE or
 *   COUNT_NEGATIVE with the index of the first bad weight; TOO_FEW_SAMPLES when all weights are zero; SETTING_INVALID when
 *   the number of independent samples is not above 0 or exceeds the sum of counts
 */
export function createHistogram(input: HistogramInput): Histogram {
  const edges = checkEdges(input.kind, input.edges)
  const weights = checkWeights(input.weights, edges.length - 1)
  if (input.content === 'density')
    weights.forEach((density, bin) => (weights[bin] = density * (edges[bin + 1] - edges[bin])))
  const total = sum(weights)
  if (!(total > 0 && Number.isFinite(total))) {
    throw new InvalidInputError('TOO_FEW_SAMPLES', 'The histogram is empty: all bins are zero.')
  }
  if (input.content !== 'count') weights.forEach((mass, bin) => (weights[bin] = mass / total))
  const independentSamples = input.independentSamples ?? null
  checkIndependentSamples(independentSamples, input.content === 'count' ? total : Infinity)
  const { kind, content, blocks = null } = input
  return { kind, edges, weights, content, independentSamples, blocks }
}

/**
 * Checks bin weights and copies them.
 *
 * @param bins number of bins the weights must match
 * @throws {InvalidInputError} LENGTH_MISMATCH; NUMBER_NOT_FINITE or COUNT_NEGATIVE with the index of the first bad weight
 */
export function checkWeights(weights: ArrayLike<number>, bins: number): Float64Array {
  if (weights.length !== bins) {
    throw new InvalidInputError('LENGTH_MISMATCH', `There are ${bins} bins but ${weights.length} values.`)
  }
  const checked = Float64Array.from(weights)
  const bad = checked.findIndex((weight) => !(weight >= 0 && Number.isFinite(weight)))
  if (bad < 0) return checked
  throw checked[bad] < 0 && Number.isFinite(checked[bad])
    ? new InvalidInputError('COUNT_NEGATIVE', `Bin ${bad + 1} holds a negative value.`, { index: bad })
    : new InvalidInputError('NUMBER_NOT_FINITE', `The value of bin ${bad + 1} is not a finite number.`, {
        index: bad,
      })
}

/**
 * Checks a stated number of independent samples; null passes.
 *
 * @param atMost sum of counts, or infinity for a density
 * @throws {InvalidInputError} SETTING_INVALID when it is not above 0 and finite, or above the sum of counts
 */
export function checkIndependentSamples(independentSamples: number | null, atMost: number): void {
  if (independentSamples === null) return
  const field = 'independentSamples'
  if (!(independentSamples > 0 && Number.isFinite(independentSamples))) {
    throw new InvalidInputError('SETTING_INVALID', 'The number of independent samples must be above 0.', {
      field,
    })
  }
  // A sum of many fractions may miss a whole number by rounding.
  if (independentSamples > atMost * (1 + 1e-9)) {
    throw new InvalidInputError(
      'SETTING_INVALID',
      `There cannot be more independent samples (${independentSamples}) than counts (${atMost}).`,
      { field },
    )
  }
}

function sum(values: Float64Array): number {
  return values.reduce((total, value) => total + value, 0)
}
