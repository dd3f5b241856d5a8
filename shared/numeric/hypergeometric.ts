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
  for (;;) {
    const value = invertFromMode(random.uniform(), { marked, plain, drawn, least, most, mode })
    if (value >= 0) return value
  }
}

interface Urn {
  marked: number
  plain: number
  drawn: number
  least: number
  most: number
  mode: number
}

/** Takes probabilities off `remaining`, mode first, then one step up and one step down in turn; −1 when none is left. */
function invertFromMode(remaining: number, { marked, plain, drawn, least, most, mode }: Urn): number {
  let above = Math.exp(logProbability(marked, plain, drawn, mode))
  remaining -= above
  if (remaining < 0) return mode
  let below = above
  let up = mode
  let down = mode
  while (up < most || down > least) {
    if (up < most) {
      above *= ((marked - up) * (drawn - up)) / ((up + 1) * (plain - drawn + up + 1))
      up++
      remaining -= above
      if (remaining < 0) return up
    }
    if (down > least) {
      below *= (down * (plain - drawn + down)) / ((marked - down + 1) * (drawn - down + 1))
      down--
      remaining -= below
      if (remaining < 0) return down
    }
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
