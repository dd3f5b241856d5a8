import { InvalidInputError } from '../errors'

/** Autocorrelations are added up to this lag at most; longer memory is looked for in the series averaged over pairs. */
const MOST_LAGS = 256
/** Block averages of fewer blocks than this are not looked at for a plateau. */
const LEAST_BLOCKS = 10

/** Block averages of one length. */
export interface BlockingLevel {
  /** Samples per block. */
  readonly length: number
  readonly blocks: number
  /** length × (unbiased variance of the block means) / (biased variance of the samples). */
  readonly inefficiency: number
  /** Its standard deviation for independent normal block means, inefficiency × √(2 / (blocks − 1)). */
  readonly deviation: number
}

/** How strongly successive samples of a series are correlated, by two ways of looking. */
export interface SeriesInefficiency {
  readonly samples: number
  /** g = 1 + 2 Σ ρ(t) over the lags before the first ρ(t) ≤ 0, at least 1. `window` is that lag, in samples. */
  readonly autocorrelation: {
    readonly inefficiency: number
    readonly deviation: number
    readonly window: number
  }
  /** Where the block averages no longer rise within their deviations; null when they rise to the end: the series is too short. */
  readonly blocking: BlockingLevel | null
  /** Lengths 1, 2, 4 … while there are two blocks. */
  readonly levels: readonly BlockingLevel[]
}

/**
 * Statistical inefficiency of a series of equally spaced samples: the factor by which correlation enlarges the variance of
 * its mean. Twice the integrated autocorrelation time ½ + Σ ρ; the window ends at the first autocorrelation that is not
 * positive (common practice), its deviation is g √(2 (2W + 1) / n) (Madras & Sokal, J. Stat. Phys. 50 (1988) 109; from
 * memory). Beside it block averages (Flyvbjerg & Petersen, J. Chem. Phys. 91 (1989) 461).
 *
 * @param series at least 2 finite values in the order of time
 * @returns null when all values are equal: a constant has no correlation
 * @throws {InvalidInputError} TOO_FEW_SAMPLES below two values; NUMBER_NOT_FINITE with the index
 */
export function seriesInefficiency(series: Float64Array): SeriesInefficiency | null {
  if (series.length < 2) {
    throw new InvalidInputError('TOO_FEW_SAMPLES', 'A series needs at least two samples.')
  }
  const index = series.findIndex((value) => !Number.isFinite(value))
  if (index >= 0) {
    throw new InvalidInputError('NUMBER_NOT_FINITE', `Sample ${index + 1} is not a finite number.`, { index })
  }
  // Of equal values the mean need not be the value to its last digit, so their variance does not tell.
  if (series.every((value) => value === series[0])) return null
  const variance = autocovariance(centred(series), 0)
  const levels = blockingLevels(series, variance)
  return {
    samples: series.length,
    autocorrelation: integrate(series, variance),
    blocking: plateau(levels),
    levels,
  }
}

/**
 * Autocorrelations ρ(t) = c(t)/c(0) with c(t) = (1/n) Σ (x_i − m)(x_{i+t} − m), divided by n at each lag (biased).
 *
 * @param lags lags 0 … lags are given, fewer than the series is long
 */
export function autocorrelations(series: Float64Array, lags: number): Float64Array {
  const values = centred(series)
  const variance = autocovariance(values, 0)
  return Float64Array.from({ length: lags + 1 }, (_, lag) => autocovariance(values, lag) / variance)
}

function integrate(series: Float64Array, variance: number): SeriesInefficiency['autocorrelation'] {
  let values = centred(series)
  let length = 1
  for (;;) {
    const own = autocovariance(values, 0)
    const most = Math.min(MOST_LAGS, values.length - 1)
    let sum = 1
    let window = 1
    for (; window <= most; window++) {
      const correlation = autocovariance(values, window) / own
      if (correlation <= 0) break
      sum += 2 * correlation
    }
    // Averages over pairs keep the variance of the mean, so g = (own g) × length × (own variance) / variance.
    if (window <= most || values.length <= 2 * MOST_LAGS) {
      const inefficiency = Math.max(1, (sum * length * own) / variance)
      const deviation = inefficiency * Math.sqrt((2 * (2 * window + 1)) / values.length)
      return { inefficiency, deviation, window: window * length }
    }
    values = averagePairs(values)
    length *= 2
  }
}

function blockingLevels(series: Float64Array, variance: number): BlockingLevel[] {
  const levels: BlockingLevel[] = []
  let means = series
  // Halving drops the same remainder as cutting blocks of the length from the start.
  for (let length = 1; means.length >= 2; length *= 2, means = averagePairs(means)) {
    const blocks = means.length
    const unbiased = (autocovariance(centred(means), 0) * blocks) / (blocks - 1)
    const inefficiency = (length * unbiased) / variance
    levels.push({ length, blocks, inefficiency, deviation: inefficiency * Math.sqrt(2 / (blocks - 1)) })
  }
  return levels
}

function plateau(levels: readonly BlockingLevel[]): BlockingLevel | null {
  const judged = levels.filter(({ blocks }) => blocks >= LEAST_BLOCKS)
  const flat = judged.findIndex((level, place) =>
    judged.slice(place + 1).every((later) => later.inefficiency - level.inefficiency <= later.deviation),
  )
  return flat < 0 || flat === judged.length - 1 ? null : judged[flat]
}

function averagePairs(values: Float64Array): Float64Array {
  return Float64Array.from(
    { length: Math.floor(values.length / 2) },
    (_, pair) => (values[2 * pair] + values[2 * pair + 1]) / 2,
  )
}

function centred(series: Float64Array): Float64Array {
  const mean = series.reduce((sum, value) => sum + value, 0) / series.length
  return series.map((value) => value - mean)
}

function autocovariance(centredValues: Float64Array, lag: number): number {
  let sum = 0
  const end = centredValues.length - lag
  for (let index = 0; index < end; index++) sum += centredValues[index] * centredValues[index + lag]
  return sum / centredValues.length
}
