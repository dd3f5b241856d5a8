/** Density is drawn as p^0.6: thin regions stay visible beside the peak. The key is labelled with true shares. */
export const DENSITY_EXPONENT = 0.6

/** The coupling map spans at least this much, in kT, so that noise about 0 stays pale. */
export const LEAST_COUPLING_LIMIT = 2

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

/** The ends of the coupling map: ±2 kT, or those of the data rounded outward to a whole kT. */
export function couplingLimit(values: ArrayLike<number>): number {
  let largest = LEAST_COUPLING_LIMIT
  for (let i = 0; i < values.length; i += 1) {
    const size = Math.abs(values[i])
    if (size > largest) largest = size
  }
  return Math.ceil(largest)
}
