import { describe, expect, it } from 'vitest'
import { blockInefficiency } from '@shared/histogram'
import { autocorrelations, createRandom, type Random, seriesInefficiency } from '@shared/numeric'
import fixture from './fixtures/block-inefficiency.json'

/*
 * Source: fixtures/block-inefficiency.json. The inefficiency of a first-order autoregressive process is analytic,
 * (1 + a)/(1 − a); that of the indicator x > 0 follows from the orthant probability of two normals (Sheppard 1899); the
 * statistics of the series were computed at high precision by their definitions. Numbers of the series are held to the
 * fixture's own tolerance, what is drawn at random to its own scatter.
 */
const { inputs, expected, tolerance } = fixture
const series = Float64Array.from(inputs.series)
const statistics = expected.series_statistics

/** x_t = a x_{t−1} + √(1 − a²) z_t, stationary. */
function autoregressive(a: number, samples: number, random: Random): Float64Array {
  const values = new Float64Array(samples)
  let value = random.normal()
  for (let index = 0; index < samples; index++) {
    values[index] = value
    value = a * value + Math.sqrt(1 - a * a) * random.normal()
  }
  return values
}

describe('a series of the reference', () => {
  const found = seriesInefficiency(series)

  it('has its autocorrelations', () => {
    const given = statistics.acf_biased_lags_0_to_15
    autocorrelations(series, 15).forEach((value, lag) =>
      expect(Math.abs(value / given[lag] - 1), `lag ${lag}`).toBeLessThan(tolerance.rel),
    )
  })

  it('has its inefficiency from the autocorrelations before the first that is not positive', () => {
    expect(found?.autocorrelation.window).toBe(statistics.first_nonpositive_lag)
    const given = statistics.g_summed_to_first_nonpositive_acf
    expect(Math.abs((found?.autocorrelation.inefficiency ?? NaN) / given - 1)).toBeLessThan(tolerance.rel)
  })

  it('has its block averages at every length', () => {
    for (const [length, given] of Object.entries(statistics.block_averaging)) {
      const level = found?.levels.find((each) => each.length === Number(length))
      expect(level?.blocks).toBe(given.n_blocks)
      const ratio = (level?.inefficiency ?? NaN) / given.inefficiency_b_var_over_c0
      expect(Math.abs(ratio - 1), `length ${length}`).toBeLessThan(tolerance.rel)
      // The standard error of the mean follows: √(g c₀ / (b · blocks)).
      const error = Math.sqrt(
        ((level?.inefficiency ?? NaN) * statistics.variance_biased_c0) / (Number(length) * given.n_blocks),
      )
      expect(Math.abs(error / given.SE_of_mean - 1)).toBeLessThan(tolerance.rel)
    }
  })
})

describe.each(expected.exact_process)('an autoregressive process with a = $a', (process) => {
  const { a, g_statistical_inefficiency: exact } = process
  const samples = 200_000

  it('gives its exact inefficiency by autocorrelations, within four deviations', () => {
    const { autocorrelation } = seriesInefficiency(autoregressive(a, samples, createRandom(1)))!
    expect(Math.abs(autocorrelation.inefficiency - exact)).toBeLessThan(4 * autocorrelation.deviation)
    // A deviation that covers everything would prove nothing.
    expect(autocorrelation.deviation / exact).toBeLessThan(0.2)
  })

  it('gives the expected inefficiency of block means at each length, within four deviations', () => {
    const { levels } = seriesInefficiency(autoregressive(a, samples, createRandom(2)))!
    for (const [length, given] of Object.entries(process.expected_inefficiency_of_block_means_b)) {
      const level = levels.find((each) => each.length === Number(length))!
      // Neighbouring block means are still correlated while blocks are short: their variance scatters up to √g wider.
      const wider = Math.sqrt(Math.max(1, exact / Number(length)))
      expect(Math.abs(level.inefficiency - given), `length ${length}`).toBeLessThan(
        4 * level.deviation * wider,
      )
    }
  })

  it('finds a plateau of block averages between half of its inefficiency and 1.3 times it', () => {
    // The plateau begins where the rise is within the noise of the next lengths: low by up to a few such deviations.
    const { blocking } = seriesInefficiency(autoregressive(a, samples, createRandom(3)))!
    expect(blocking!.inefficiency).toBeGreaterThan(exact / 2)
    expect(blocking!.inefficiency).toBeLessThan(1.3 * exact)
  })

  it('gives the counts on both sides of the median their own, smaller inefficiency by blocks', () => {
    // 200 blocks of more than 200 memory times each; what is cut at their ends is below 1 %.
    const [blocks, length] = [200, Math.max(1000, Math.ceil(100 * exact))]
    const random = createRandom(4)
    const counts = Array.from({ length: blocks }, () => {
      const above = autoregressive(a, length, random).reduce((sum, value) => sum + (value > 0 ? 1 : 0), 0)
      return Float64Array.of(length - above, above)
    })
    const { inefficiency, deviation } = blockInefficiency({ kind: 'chain', counts })
    expect(Math.abs(inefficiency - process.g_of_median_indicator)).toBeLessThan(3 * deviation)
    // √(2 / 199) for one degree of freedom, from memory: the χ² law of a variance.
    expect(deviation / inefficiency).toBeGreaterThan(0.06)
    expect(deviation / inefficiency).toBeLessThan(0.15)
  })
})
