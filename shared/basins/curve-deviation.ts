import type { Potential } from '../inversion'

/**
 * Standard deviation of U(q) − U(knot of least energy), on the straight line between the two knots beside q; that of one knot
 * where the other says nothing, and that of the end knot beyond the ends.
 *
 * @param coordinate nm or rad; a dihedral in [−π, π)
 * @returns kJ/mol; NaN where neither knot says anything, and everywhere without a sample size
 */
export function deviationAt({ knots, deviations, period }: Potential, coordinate: number): number {
  if (deviations === null) return NaN
  const [first, last] = [0, knots.length - 1]
  const above = knots.findIndex((knot) => knot > coordinate)
  if (above > 0) return between(deviations, above - 1, above, knots, coordinate)
  if (period === null) return deviations[above === 0 ? first : last]
  // Between the last knot and the first one a turn later.
  const past = coordinate < knots[last] ? coordinate + period : coordinate
  const width = knots[first] + period - knots[last]
  return blend(deviations[last], deviations[first], (past - knots[last]) / width)
}

function between(
  deviations: Float64Array,
  below: number,
  above: number,
  knots: Float64Array,
  coordinate: number,
): number {
  const share = (coordinate - knots[below]) / (knots[above] - knots[below])
  return blend(deviations[below], deviations[above], share)
}

function blend(one: number, other: number, share: number): number {
  if (Number.isNaN(one)) return other
  return Number.isNaN(other) ? one : one + share * (other - one)
}
