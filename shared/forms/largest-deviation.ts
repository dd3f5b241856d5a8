import { type Potential, potentialEnergy } from '../inversion'
import type { LargestDeviation } from './form'
import type { LikelihoodCells } from './likelihood-cells'

/** Data live where p/J of the reference is above this share of its peak: 4.6 kT above its minimum. */
const LIVING_SHARE = 0.01

/**
 * The largest |ΔU| between a form and a reference potential, at the midpoints of the bins between the first and the last
 * filled one where p/J under the reference is above 1 % of its peak there. The free constant is the mean of ΔU weighted
 * with the probability of the bins under the reference.
 *
 * @param energy of the form, kJ/mol
 * @returns null when no bin qualifies
 */
export function largestDeviation(
  { edges, volumes, populated, kT }: Pick<LikelihoodCells, 'edges' | 'volumes' | 'populated' | 'kT'>,
  energy: (coordinate: number) => number,
  reference: Potential,
): LargestDeviation | null {
  const midpoints = Array.from(volumes, (_, bin) => (edges[bin] + edges[bin + 1]) / 2)
  const inside = midpoints
    .map((coordinate, bin) => ({ coordinate, bin, level: potentialEnergy(reference, coordinate) / kT }))
    .filter(({ coordinate }) => coordinate > populated[0] && coordinate < populated[1])
  const lowest = inside.reduce((least, { level }) => Math.min(least, level), Infinity)
  const living = inside.filter(({ level }) => level - lowest < -Math.log(LIVING_SHARE))
  let [weights, sum] = [0, 0]
  const differences = living.map(({ coordinate, bin, level }) => {
    const weight = volumes[bin] * Math.exp(lowest - level)
    const difference = energy(coordinate) / kT - level
    weights += weight
    sum += weight * difference
    return { coordinate, difference }
  })
  return differences.reduce<LargestDeviation | null>((largest, { coordinate, difference }) => {
    const value = Math.abs(difference - sum / weights)
    return largest === null || value > largest.value ? { value, coordinate } : largest
  }, null)
}
