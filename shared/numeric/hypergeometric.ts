import { logFactorial } from './log-factorial'
import type { Random } from './random'

/**
 * A hypergeometric number: how many of `drawn` balls, taken without return from an urn of `marked` marked and `plain`
 * plain ones, are marked. Exact, by inversion outwards from the mode, so the cost grows with the standard deviation
 * and not with the number of balls (the scheme of Patefield, Appl. Stat. 30 (1981) 91).
 *
 * @param marked whole, ≥ 0
 * @param plain whole, ≥ 0
 * @param drawn whole, from 0 to marked + plain; none of the three is checked, since this stands in inner loops
 * @example hypergeometric(random, 3, 0, 2) // 2
 */
export function hypergeometric(random: Random, marked: number, plain: number, drawn: number): number {
  const least = Math.max(0, drawn - plain)
  const most = Math.min(marked, drawn)
  if (least === most) return least
  const total = marked + plain
  const mode = Math.min(most, Math.max(least, Math.floor(((drawn + 1) * (marked + 1)) / (total + 2))))
  // Rounding leaves the sum of all probabilities a hair below 1; a number that falls into that gap is drawn again.
  const peak = Math.exp(logProbability(marked, plain, drawn, mode))
  for (;;) {
    const value = invertFromMode(random.uniform(), peak, mode, marked, plain, drawn)
    if (value >= 0) return value
  }
}

/**
 * Takes probabilities off `remaining`, mode first, then one step up and one step down in turn; −1 when none is left. Numbers,
 * not a record, go in: it is called some hundred thousand times in a row. A step beyond the last possible number multiplies
 * the probability by zero.
 */
function invertFromMode(
  remaining: number,
  peak: number,
  mode: number,
  marked: number,
  plain: number,
  drawn: number,
): number {
  remaining -= peak
  if (remaining < 0) return mode
  let above = peak
  let below = peak
  let up = mode
  let down = mode
  const least = plain - drawn
  while (above > 0 || below > 0) {
    above *= ((marked - up) * (drawn - up)) / ((up + 1) * (least + up + 1))
    up++
    remaining -= above
    if (remaining < 0) return up
    below *= (down * (least + down)) / ((marked - down + 1) * (drawn - down + 1))
    down--
    remaining -= below
    if (remaining < 0) return down
  }
  return -1
}

function logProbability(marked: number, plain: number, drawn: number, value: number): number {
  return (
    logFactorial(marked) -
    logFactorial(value) -
    logFactorial(marked - value) +
    logFactorial(plain) -
    logFactorial(drawn - value) -
    logFactorial(plain - drawn + value) -
    logFactorial(marked + plain) +
    logFactorial(drawn) +
    logFactorial(marked + plain - drawn)
  )
}
