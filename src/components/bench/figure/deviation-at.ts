import type { Potential } from '@shared/inversion'

/**
 * Standard deviation of U − U_min between the knots, linear: around the turn for a dihedral; beyond the outermost knots of
 * a bond or angle that of the knot. NaN beside a knot that data say nothing about, null without a stated sample size.
 *
 * @param coordinate in internal units
 */
export function deviationAt(potential: Potential, coordinate: number): number | null {
  const { knots, deviations, period } = potential
  if (deviations === null) return null
  const last = knots.length - 1
  if (coordinate < knots[0] || coordinate > knots[last]) {
    if (period === null) return deviations[coordinate < knots[0] ? 0 : last]
    const beyond = coordinate > knots[last] ? coordinate - knots[last] : coordinate + period - knots[last]
    return mix(deviations[last], deviations[0], beyond / (knots[0] + period - knots[last]))
  }
  let low = 0
  let high = last
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (knots[middle] <= coordinate) low = middle
    else high = middle
  }
  return mix(deviations[low], deviations[high], (coordinate - knots[low]) / (knots[high] - knots[low]))
}

const mix = (from: number, to: number, share: number): number => from + (to - from) * share
