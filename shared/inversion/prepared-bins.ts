import { InvalidInputError } from '../errors'
import {
  type AppliedInefficiency,
  binCentroids,
  binMidpoints,
  binVolumes,
  effectiveSamples,
  type Histogram,
} from '../histogram'
import { IDENTITY_BINS } from '../smoothing'

/** Fewest filled bins that an inversion accepts. */
export const MINIMUM_FILLED_BINS = 5

/** Files of expected counts hold fractions down to 1e-20; this many effective counts at an end say nothing (fewer of few). */
const NO_COUNT = 1e-6

/**
 * The part of a turn that a histogram leaves out is divided into at most this many bins, and fewer, down to the other number,
 * where all would be more than are smoothed one by one. Nothing happens there that needs narrower ones.
 */
const ADDED = { most: 180, least: 36 }

/** A histogram laid out for inversion; for a dihedral the bins fill the turn. */
export interface PreparedBins {
  readonly edges: Float64Array
  readonly midpoints: Float64Array
  readonly centroids: Float64Array
  /** ∫ J dq, or widths with the Jacobian off. */
  readonly volumes: Float64Array
  /** Effective counts: weights scaled to the number of independent samples, or to sum 1 where that is unknown. */
  readonly counts: Float64Array
  readonly independentSamples: number | null
  /** What counts were divided by; null for a density or a probability. */
  readonly inefficiency: AppliedInefficiency | null
  /** Number of added bins before and after those of the histogram. */
  readonly added: readonly [before: number, after: number]
  /** First and last filled bin. */
  readonly filled: readonly [first: number, last: number]
}

/**
 * Lays a histogram out for inversion. The part of a turn that a dihedral histogram does not cover is divided into bins of
 * its mean width without counts, or wider ones where that would be very many: a chain on the table then goes only where the histogram says. Counts are divided by their
 * statistical inefficiency as `effectiveSamples` finds it; a density or probability without a stated number keeps null.
 *
 * @param stated the user's own g, at least 1; null takes what the histogram says
 * @throws {InvalidInputError} TOO_FEW_BINS with fewer than 5 filled bins; TOO_FEW_SAMPLES when counts add up to less than 1
 */
export function prepareBins(
  histogram: Histogram,
  jacobian: boolean,
  stated: number | null = null,
): PreparedBins {
  const { kind, weights } = histogram
  const total = weights.reduce((sum, weight) => sum + weight, 0)
  const { independentSamples, inefficiency } = effectiveSamples(histogram, stated)
  if (independentSamples !== null && independentSamples < 1) {
    throw new InvalidInputError(
      'TOO_FEW_SAMPLES',
      `The counts stand for ${independentSamples.toPrecision(2)} independent samples, less than one. If they are a density or probabilities, say so.`,
    )
  }
  const [before, after] = kind === 'dihedral' ? missingEdges(histogram.edges) : [[], []]
  const edges = Float64Array.from([...before, ...histogram.edges, ...after])
  const added = [before.length, after.length] as const
  const counts = new Float64Array(edges.length - 1)
  weights.forEach((weight, bin) => (counts[bin + added[0]] = (weight / total) * (independentSamples ?? 1)))
  const filled = filledRange(
    counts,
    independentSamples === null ? 0 : NO_COUNT * Math.min(1, independentSamples / 1000),
  )
  checkFilled(counts, filled)
  return {
    edges,
    midpoints: binMidpoints(edges),
    centroids: binCentroids(kind, edges, jacobian),
    volumes: binVolumes(kind, edges, jacobian),
    counts,
    independentSamples,
    inefficiency,
    added,
    filled,
  }
}

function checkFilled(counts: Float64Array, [first, last]: readonly [number, number]): void {
  const inside = counts.subarray(first, last + 1)
  const filledBins = inside.reduce((sum, count) => sum + (count > 0 ? 1 : 0), 0)
  if (filledBins >= MINIMUM_FILLED_BINS) return
  throw new InvalidInputError(
    'TOO_FEW_BINS',
    `Only ${filledBins} of ${counts.length} bins hold data; at least ${MINIMUM_FILLED_BINS} are needed.`,
  )
}

/** First and last bin that hold data: outer bins are left out while their counts add up to no more than `negligible`. */
function filledRange(counts: Float64Array, negligible: number): [number, number] {
  let [first, last] = [0, counts.length - 1]
  for (let sum = counts[first]; sum <= negligible; sum += counts[first]) first += 1
  for (let sum = counts[last]; sum <= negligible; sum += counts[last]) last -= 1
  return [first, last]
}

function missingEdges(edges: Float64Array): [number[], number[]] {
  const [first, last] = [edges[0], edges[edges.length - 1]]
  const bins = edges.length - 1
  const most = Math.min(Math.max(IDENTITY_BINS - bins, ADDED.least), ADDED.most)
  const missing = first + 2 * Math.PI - last
  const width = Math.max((last - first) / bins, missing / most)
  const divide = (low: number, high: number) => {
    const bins = Math.max(1, Math.round((high - low) / width))
    return Array.from({ length: bins + 1 }, (_, edge) => low + ((high - low) * edge) / bins)
  }
  const before = first > -Math.PI ? divide(-Math.PI, first).slice(0, -1) : []
  const after = last < Math.PI ? divide(last, Math.PI).slice(1) : []
  if (after.length > 0) after[after.length - 1] = Math.PI
  return [before, after]
}
