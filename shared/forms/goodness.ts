import type { FormGoodness } from './form'
import type { LikelihoodCells } from './likelihood-cells'

/** Expected counts below which Pearson's chi-square has not its distribution (common practice). */
const LEAST_EXPECTED = 5

/**
 * Pearson's chi-square of effective counts against a form, with neighbouring cells merged from the left until each group
 * expects at least 5.
 *
 * @param probabilities of the cells under the form
 * @param freeParameters fitted ones, taken off the freedom
 * @returns null when the number of independent samples is unknown or no freedom is left
 */
export function goodnessOfFit(
  { shares, independentSamples }: LikelihoodCells,
  probabilities: Float64Array,
  freeParameters: number,
): FormGoodness | null {
  if (independentSamples === null) return null
  let [chiSquare, groups, observed, expected] = [0, 0, 0, 0]
  let left = independentSamples
  for (let cell = 0; cell < shares.length; cell++) {
    observed += shares[cell] * independentSamples
    expected += probabilities[cell] * independentSamples
    left -= probabilities[cell] * independentSamples
    // What is left over would not fill a group of its own: it joins this one.
    const last = cell === shares.length - 1
    if (!last && (expected < LEAST_EXPECTED || left < LEAST_EXPECTED)) continue
    if (expected > 0) chiSquare += (observed - expected) ** 2 / expected
    groups += 1
    observed = 0
    expected = 0
  }
  const freedom = groups - 1 - freeParameters
  return freedom >= 1 ? { chiSquare, freedom } : null
}
