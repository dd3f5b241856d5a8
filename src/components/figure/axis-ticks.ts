/** Ticks of one axis: labelled ones, unlabelled ones between them, and how many decimals a label needs. */
export interface AxisTicks {
  readonly major: readonly number[]
  readonly minor: readonly number[]
  readonly step: number
  readonly minorStep: number
  readonly decimals: number
}

/** Steps of an angle in degrees divide the turn; all else counts in 1, 2, 5. Each with its minor step. */
const DEGREE_STEPS: readonly (readonly [number, number])[] = [
  [1, 0.5],
  [2, 1],
  [5, 1],
  [10, 5],
  [20, 10],
  [30, 10],
  [60, 30],
  [90, 30],
  [180, 90],
]
const DECADE_STEPS: readonly (readonly [number, number])[] = [
  [1, 0.5],
  [2, 1],
  [5, 1],
  [10, 5],
]

/**
 * The finest step that leaves at most `most` labelled ticks between `low` and `high`, with its minor step.
 */
export function tickStep(low: number, high: number, most: number, degrees = false): [number, number] {
  const least = (high - low) / Math.max(1, most)
  const whole = degrees ? DEGREE_STEPS.find(([step]) => step >= least * (1 - 1e-9)) : undefined
  if (whole !== undefined && least >= 0.5) return [...whole]
  const decade = 10 ** Math.floor(Math.log10(least) + 1e-9)
  const [step, minor] = DECADE_STEPS.find(([multiple]) => multiple * decade >= least * (1 - 1e-9))!
  return [step * decade, minor * decade]
}

/** Multiples of `step` within [low, high], counted in whole steps so that no rounding error adds up. */
function multiples(low: number, high: number, step: number): number[] {
  const slack = 1e-9
  const first = Math.ceil(low / step - slack)
  const last = Math.floor(high / step + slack)
  const values: number[] = []
  for (let index = first; index <= last; index += 1) values.push(index * step + 0)
  return values
}

/**
 * Ticks of the axis from `low` to `high` with at most `most` labels (one more where both ends are labelled). Minor ticks
 * exclude the major ones. Degrees take steps that divide the turn: 10, 20, 30, 60, 90.
 */
export function axisTicks(low: number, high: number, most: number, degrees = false): AxisTicks {
  const [step, minorStep] = tickStep(low, high, most, degrees)
  const major = multiples(low, high, step)
  const perMajor = Math.round(step / minorStep)
  const minor = multiples(low, high, minorStep).filter(
    (value) => Math.round(value / minorStep) % perMajor !== 0,
  )
  return { major, minor, step, minorStep, decimals: stepDecimals(step) }
}

/** Decimals that tell neighbouring multiples of a step apart. */
export function stepDecimals(step: number): number {
  return Math.max(0, -Math.floor(Math.log10(step) + 1e-9))
}
