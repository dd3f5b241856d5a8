import { createHistogram, type CoordinateKind, type Histogram } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert, potentialEnergy } from '@shared/inversion'

/** Counts so many that their noise is far below anything that is judged: exact bin probabilities. */
const EXACT_SAMPLES = 1e8
/** Samples that the accuracy of inversion is promised for. */
const JUDGED_SAMPLES = 1e7

/** A potential whose exact bin probabilities are known. */
export interface ExactCase {
  readonly kind: CoordinateKind
  readonly temperature: number
  /** kJ/mol */
  readonly kT: number
  readonly edges: readonly number[]
  readonly probabilities: readonly number[]
  /** Up to a constant, kJ/mol, coordinate in nm or rad. */
  readonly energy: (coordinate: number) => number
}

/** Exact probabilities as counts, `samples` in all. */
export function exactHistogram(exact: ExactCase, samples = EXACT_SAMPLES): Histogram {
  const weights = exact.probabilities.map((probability) => probability * samples)
  return createHistogram({ kind: exact.kind, edges: exact.edges, weights, content: 'count' })
}

/**
 * The largest distance in kT between the automatic inversion of exact probabilities and the true potential, wherever the
 * latter is less than 6 kT above its minimum; both have least value 0 there.
 */
export function largestError(exact: ExactCase): number {
  const { kT, temperature, edges, energy } = exact
  const { potential } = invert(exactHistogram(exact, JUDGED_SAMPLES), temperature, DEFAULT_INVERSION_SETTINGS)
  const [low, high] = [edges[0], edges[edges.length - 1]]
  const places = Array.from({ length: 4001 }, (_, place) => low + ((high - low) * place) / 4000)
  const truth = places.map(energy)
  const least = Math.min(...truth)
  const errors = places.flatMap((place, index) => {
    const above = truth[index] - least
    return above < 6 * kT ? [Math.abs(potentialEnergy(potential, place) - above) / kT] : []
  })
  return Math.max(...errors)
}

/**
 * The same density on bins of unequal width: neighbours are put together in turns of the given lengths.
 *
 * @param lengths whole numbers from 1
 */
export function ragged(exact: ExactCase, lengths: readonly number[]): ExactCase {
  const edges = [exact.edges[0]]
  const probabilities: number[] = []
  for (let bin = 0, turn = 0; bin < exact.probabilities.length; turn++) {
    const end = Math.min(bin + lengths[turn % lengths.length], exact.probabilities.length)
    probabilities.push(exact.probabilities.slice(bin, end).reduce((sum, probability) => sum + probability, 0))
    edges.push(exact.edges[end])
    bin = end
  }
  return { ...exact, edges, probabilities }
}

/** `bins` + 1 equally spaced edges. */
export function edgesOf(low: number, high: number, bins: number): number[] {
  return Array.from({ length: bins + 1 }, (_, edge) => low + ((high - low) * edge) / bins)
}
