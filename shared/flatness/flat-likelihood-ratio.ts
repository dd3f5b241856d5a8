import { chiSquareSurvival } from '../numeric/chi-square'
import type { FlatLikelihoodRatio } from './flatness'

const TURN = 2 * Math.PI
/** Expected counts below which the ratio has not its distribution (common practice). */
const LEAST_EXPECTED = 5

/**
 * Likelihood ratio of a histogram of a dihedral against the flat distribution, with counts divided by the statistical
 * inefficiency. Neighbouring bins are merged from the left until each expects at least 5; what is left over joins the last, and
 * so does the part of the turn that the bins leave out.
 *
 * @param weights counts or masses, any factor
 * @param edges rad, within one turn; length n + 1
 * @param independentSamples N > 0
 * @returns null where fewer than two bins remain
 */
export function flatLikelihoodRatio(
  weights: Float64Array,
  edges: Float64Array,
  independentSamples: number,
): FlatLikelihoodRatio | null {
  const total = weights.reduce((sum, weight) => sum + weight, 0)
  const groups = mergedBins(weights, edges, (LEAST_EXPECTED * TURN) / independentSamples)
  if (groups.length < 2) return null
  const ratio = groups.reduce((sum, { weight, width }) => {
    if (weight === 0) return sum
    const share = weight / total
    return sum + share * Math.log((share * TURN) / width)
  }, 0)
  // Rounding may leave a perfectly flat histogram a hair below 0.
  const value = Math.max(0, 2 * independentSamples * ratio)
  const freedom = groups.length - 1
  return { value, freedom, pValue: chiSquareSurvival(value, freedom) }
}

interface Group {
  weight: number
  width: number
}

function mergedBins(weights: Float64Array, edges: Float64Array, leastWidth: number): Group[] {
  const groups: Group[] = []
  let open: Group = { weight: 0, width: 0 }
  const close = () => {
    groups.push(open)
    open = { weight: 0, width: 0 }
  }
  weights.forEach((weight, bin) => {
    open = { weight: open.weight + weight, width: open.width + edges[bin + 1] - edges[bin] }
    // Widths are differences of rounded edges.
    if (open.width >= leastWidth * (1 - 1e-9)) close()
  })
  open.width += Math.max(0, TURN - (edges[edges.length - 1] - edges[0]))
  if (open.width >= leastWidth) close()
  const last = groups.at(-1)
  if (last === undefined) return [open]
  last.weight += open.weight
  last.width += open.width
  return groups
}
