/** Density is drawn as p^0.6: thin regions stay visible beside the peak. The key is labelled with true shares. */
export const DENSITY_EXPONENT = 0.6

/** The coupling map spans at least this much, in kT, so that noise about 0 stays pale. */
const LEAST_COUPLING_LIMIT = 2

/** It never spans more: a cell without counts would else wash out all others. */
const MOST_COUPLING_LIMIT = 3

/**
 * Place of a density on its ramp; what exceeds the highest value of the scale takes the colour of the end.
 *
 * @param share of the highest value, from 0
 * @param steps length of the ramp
 */
export function densityStep(share: number, steps: number): number {
  return Math.round(Math.min(1, share) ** DENSITY_EXPONENT * (steps - 1))
}

/**
 * Place of a coupling on its ramp, whose middle is 0.
 *
 * @param value in kT
 * @param limit value at the ends; what lies beyond takes the colour of the end
 */
export function couplingStep(value: number, limit: number, steps: number): number {
  const bounded = Math.max(-limit, Math.min(limit, value))
  return Math.round(((bounded / limit + 1) / 2) * (steps - 1))
}

/** The ends of the coupling map in kT: ±2, or the data's rounded outward, but not beyond ±3. */
export function couplingLimit(values: ArrayLike<number>): number {
  let largest = LEAST_COUPLING_LIMIT
  for (let i = 0; i < values.length; i += 1) {
    const size = Math.abs(values[i])
    if (size > largest) largest = size
  }
  return Math.min(MOST_COUPLING_LIMIT, Math.ceil(largest))
}

/** Whether a value lies beyond the end of the scale, so that the key can say so. */
export function exceedsLimit(values: ArrayLike<number>, end: number): boolean {
  for (let i = 0; i < values.length; i += 1) {
    if (Math.sign(values[i]) === Math.sign(end) && Math.abs(values[i]) > Math.abs(end)) return true
  }
  return false
}
