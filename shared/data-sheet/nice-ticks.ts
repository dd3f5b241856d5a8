/** Places of labels along an axis. */
export interface Ticks {
  readonly values: readonly number[]
  readonly decimals: number
}

/** Steps of degrees that divide a turn. */
const DEGREE_STEPS = [1, 2, 5, 10, 15, 30, 45, 60, 90, 180]

/**
 * Round values from `low` to `high`, at most `most` of them.
 *
 * @param degrees takes steps that divide a turn
 * @example niceTicks(0, 180, 5, true).values // [0, 45, 90, 135, 180]
 */
export function niceTicks(low: number, high: number, most: number, degrees = false): Ticks {
  const least = (high - low) / most
  const power = 10 ** Math.floor(Math.log10(least))
  const decimal = [1, 2, 5, 10, 20].map((factor) => factor * power)
  const steps = degrees && least > 0.5 ? DEGREE_STEPS : decimal
  const count = (step: number): number => Math.floor(high / step + 1e-9) - Math.ceil(low / step - 1e-9) + 1
  const step = steps.find((each) => count(each) <= most) ?? steps[steps.length - 1]
  const first = Math.ceil(low / step - 1e-9)
  return {
    values: Array.from({ length: Math.max(0, count(step)) }, (_, index) => (first + index) * step + 0),
    decimals: Math.max(0, -Math.floor(Math.log10(step) + 1e-9)),
  }
}
