import { describe, expect, it } from 'vitest'
import { correlate } from '@shared/correlation'
import { mutualInformation, mutualInformationMillerMadow } from '@shared/correlation/mutual-information'
import { accumulateJoint, createJointHistogram } from '@shared/histogram'
import { createRandom, type Random } from '@shared/numeric'
import { edgesOf } from '../support/exact-histograms'
import fixture from './fixtures/joint-2d.json'

const { bivariate_normal, binned_probability_matrix, miller_madow_worked_example, two_basin } =
  fixture.expected

describe('mutual information of tables', () => {
  it('of the binned normal density with ρ = 0.5 (analytic, by quadrature)', () => {
    const matrix = Float64Array.from(binned_probability_matrix.rows_x_columns_y.flat())
    const sum = matrix.reduce((all, mass) => all + mass, 0)
    const value = mutualInformation(
      matrix.map((mass) => mass / sum),
      binned_probability_matrix.n,
    )
    // The fixture prints probabilities with twelve digits.
    expect(Math.abs(value - binned_probability_matrix.MI_renormalised_nats)).toBeLessThan(1e-10)
  })

  it('of the worked example, plug-in and with the Miller–Madow correction', () => {
    const { counts, N, MI_plugin, MI_miller_madow } = miller_madow_worked_example
    const masses = Float64Array.from(counts.flat(), (count) => count / N)
    expect(Math.abs(mutualInformation(masses, 4) - MI_plugin)).toBeLessThan(1e-11)
    expect(Math.abs(mutualInformationMillerMadow(masses, 4, N) - MI_miller_madow)).toBeLessThan(1e-11)
  })
})

/** Bonds and angles whose standardised values are the two numbers drawn. */
function sampled(
  draw: (random: Random) => readonly [number, number],
  samples: number,
  bins: number,
  seed: number,
) {
  const random = createRandom(seed)
  const pairs = Array.from({ length: samples }, () => inWindow(() => draw(random), 4))
  const x = pairs.map(([value]) => 0.35 + 0.01 * value)
  const y = pairs.map(([, value]) => 2 + 0.1 * value)
  const xEdges = Float64Array.from(edgesOf(0.31, 0.39, bins))
  const yEdges = Float64Array.from(edgesOf(1.6, 2.4, bins))
  const weights = accumulateJoint(x, y, xEdges, yEdges)
  return createJointHistogram({ kinds: ['bond', 'angle'], xEdges, yEdges, weights, content: 'count' })
}

/** Draws again until both numbers lie within ± `limit`: densities of the fixture are renormalised to the window. */
function inWindow(draw: () => readonly [number, number], limit: number): readonly [number, number] {
  for (;;) {
    const pair = draw()
    if (Math.abs(pair[0]) < limit && Math.abs(pair[1]) < limit) return pair
  }
}

function normalPair(rho: number): (random: Random) => readonly [number, number] {
  return (random) => {
    const x = random.normal()
    return [x, rho * x + Math.sqrt(1 - rho * rho) * random.normal()]
  }
}

/** Analytic: −½ ln(1 − ρ²), on 40 × 40 bins over ±4σ by quadrature. */
describe('100,000 samples on 40 × 40 bins', () => {
  it.each(bivariate_normal)(
    'ρ = $rho: within 0.01 nats of the exact value, and the right verdict',
    (exact) => {
      const { mutualInformationCorrected, verdict, pearson } = correlate(
        sampled(normalPair(exact.rho), 100_000, 40, 11),
      )
      const reference = exact.MI_binned_nats['40x40_on_pm4_sigma']
      expect(Math.abs((mutualInformationCorrected ?? NaN) - reference)).toBeLessThan(0.01)
      expect(pearson).toBeCloseTo(exact.rho, 1)
      const expected = { 0: 'separable', 0.2: 'borderline', 0.5: 'joint', 0.8: 'joint' }[exact.rho]
      // ρ = 0.2 stands at 0.0204 nats, on the threshold: either side is right.
      expect(exact.rho === 0.2 ? ['separable', 'borderline'] : [expected]).toContain(verdict)
    },
  )
})

describe('two basins', () => {
  it('need a joint potential: the sampled value is within 0.02 nats of the exact one (analytic mixture)', () => {
    const components = fixture.inputs.two_basin.components_w_mx_sx_my_sy
    const random = createRandom(5)
    const xEdges = Float64Array.from(edgesOf(0.26, 0.48, 44))
    const yEdges = Float64Array.from(edgesOf(1.2, Math.PI, 48))
    const pairs = Array.from({ length: 100_000 }, () => {
      const [, mx, sx, my, sy] = components[random.uniform() < components[0][0] ? 0 : 1]
      const [x, y] = inWindow(() => [random.normal(), random.normal()], 4.4)
      return [mx + sx * x, my + sy * y]
    })
    const weights = accumulateJoint(
      pairs.map(([x]) => x),
      pairs.map(([, y]) => y),
      xEdges,
      yEdges,
    )
    const joint = createJointHistogram({
      kinds: ['bond', 'angle'],
      xEdges,
      yEdges,
      weights,
      content: 'count',
    })
    const { verdict, mutualInformationCorrected } = correlate(joint)
    expect(verdict).toBe('joint')
    expect(Math.abs((mutualInformationCorrected ?? NaN) - two_basin.MI_nats)).toBeLessThan(0.02)
  })
})

describe('independent terms at 2,000 samples', () => {
  it('are never advised a joint potential in 200 seeded repeats (below 1 %)', () => {
    const verdicts = Array.from(
      { length: 200 },
      (_, seed) => correlate(sampled(normalPair(0), 2000, 90, 1000 + seed)).verdict,
    )
    expect(verdicts.filter((verdict) => verdict === 'joint').length).toBeLessThan(2)
  })
})
