import { describe, expect, it } from 'vitest'
import { dihedralFlatness, FLAT_BELOW, flatLikelihoodRatio } from '@shared/flatness'
import { createHistogram, type BinContent } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert } from '@shared/inversion'
import { createRandom } from '@shared/numeric'
import { edgesOf } from '../../../support/exact-histograms'

const TEMPERATURE = 400
const BINS = 72
const edges = edgesOf(-Math.PI, Math.PI, BINS)

/** Poisson counts of U = (a/2)(1 + cos 3φ), a in kT; 0 seed for the exact ones. */
function inverted(
  amplitude: number,
  samples: number,
  seed: number,
  content: BinContent = 'count',
  seen: (angle: number) => boolean = () => true,
) {
  const random = createRandom(seed)
  const masses = edges.slice(1).map((edge, bin) => {
    const middle = (edge + edges[bin]) / 2
    return seen(middle) ? Math.exp(-(amplitude / 2) * (1 + Math.cos(3 * middle))) : 0
  })
  const total = masses.reduce((sum, mass) => sum + mass, 0)
  const weights = masses.map((mass) => random.poisson((samples * mass) / total))
  return invert(
    createHistogram({ kind: 'dihedral', edges, weights, content }),
    TEMPERATURE,
    DEFAULT_INVERSION_SETTINGS,
  )
}
const judged = (...parts: Parameters<typeof inverted>) => dihedralFlatness(inverted(...parts))

describe('dihedralFlatness', () => {
  it('lets a flat dihedral be dropped and keeps one that is not, in every one of 20 seeded repeats', () => {
    for (let seed = 1; seed <= 20; seed++) {
      expect(judged(0, 5000, seed).verdict).toBe('flat')
      expect(judged(0.2, 20_000, seed).verdict).toBe('flat')
      expect(judged(1, 20_000, seed).verdict).toBe('keep')
    }
  })

  it('states amplitude, divergence and likelihood ratio of what it was given', () => {
    const { amplitude, amplitudeDeviation, amplitudeRange, divergence, likelihoodRatio, ...rest } = judged(
      1,
      50_000,
      3,
    )
    expect(Math.abs(amplitude - 1)).toBeLessThan(3 * (amplitudeDeviation ?? 0))
    expect(amplitudeRange?.[0]).toBeLessThan(amplitude)
    expect(amplitudeRange?.[1]).toBeGreaterThan(amplitude)
    // Analytic: 0.0597 nats for a = 1 kT; its standard error is √(var ln p / N) = 0.0016.
    expect(Math.abs(divergence - 0.0597)).toBeLessThan(0.005)
    expect(Math.abs(rest.divergenceBinned - rest.divergenceByChance! - 0.0597)).toBeLessThan(0.005)
    expect(likelihoodRatio).toMatchObject({ freedom: BINS - 1 })
    expect(likelihoodRatio?.value).toBeCloseTo(2 * (rest.independentSamples ?? 0) * rest.divergenceBinned, 8)
    expect(likelihoodRatio?.pValue).toBeLessThan(1e-12)
    expect(rest).toMatchObject({
      flatBelow: FLAT_BELOW,
      doubt: null,
      independentSamples: expect.any(Number) as number,
    })
  })

  it('is undecided at the threshold, and with samples too few to see a wave', () => {
    expect(judged(0.5, 20_000, 1)).toMatchObject({ verdict: 'undecided', doubt: 'BAND_TOO_WIDE' })
    // 4√(2/60) = 0.73 kT could hide, however smooth the curve.
    expect(judged(0, 60, 1)).toMatchObject({ verdict: 'undecided', doubt: 'BAND_TOO_WIDE' })
  })

  it('is undecided without a sample size, and says why', () => {
    const flatness = judged(1, 20_000, 1, 'probability')
    expect(flatness).toMatchObject({
      verdict: 'undecided',
      doubt: 'SAMPLE_SIZE_UNKNOWN',
      amplitudeRange: null,
      divergenceByChance: null,
      likelihoodRatio: null,
    })
    expect(flatness.amplitude).toBeGreaterThan(0.9)
  })

  it('keeps a dihedral that is flat where it is seen but seen in part of the turn only', () => {
    const inversion = inverted(0, 20_000, 1, 'count', (angle) => Math.abs(angle) < 1)
    // The smooth curve rises by 1 kT in the last bins that were seen, and by much more where nobody was.
    const { amplitude, amplitudeRange, verdict } = dihedralFlatness(inversion, 2)
    expect(amplitude).toBeLessThan(2)
    expect(amplitudeRange?.[0]).toBeGreaterThan(2)
    expect(verdict).toBe('keep')
  })

  it('judges at the threshold asked for', () => {
    expect(dihedralFlatness(inverted(1, 20_000, 1), 1.5)).toMatchObject({ verdict: 'flat', flatBelow: 1.5 })
    expect(dihedralFlatness(inverted(0.2, 20_000, 1), 0.05).verdict).toBe('keep')
  })

  it('refuses another kind and a threshold that is not above 0', () => {
    const torsion = inverted(0, 1000, 1)
    const refused = expect.objectContaining({ code: 'SETTING_INVALID' }) as Error
    expect(() => dihedralFlatness({ ...torsion, kind: 'angle' })).toThrow(refused)
    expect(() => dihedralFlatness(torsion, 0)).toThrow(refused)
  })
})

describe('flatLikelihoodRatio', () => {
  it('is smaller than 5 % in 5 % of flat histograms, well filled or not', () => {
    for (const samples of [200, 5000]) {
      let small = 0
      for (let seed = 0; seed < 1000; seed++) {
        const random = createRandom(seed)
        const counts = new Float64Array(BINS)
        for (let sample = 0; sample < samples; sample++) counts[random.integer(BINS)]++
        const ratio = flatLikelihoodRatio(counts, Float64Array.from(edges), samples)
        if ((ratio?.pValue ?? 1) < 0.05) small++
      }
      // The ratio of bins that expect 5 is a little too large; ± four standard errors of a share of 1,000 are 2.8 %.
      expect(small / 1000).toBeGreaterThan(0.025)
      expect(small / 1000).toBeLessThan(0.1)
    }
  })

  it('merges bins until each expects 5 and counts the part of a turn that nobody binned', () => {
    const counts = Float64Array.from({ length: 36 }, () => 1)
    expect(flatLikelihoodRatio(counts, Float64Array.from(edgesOf(-Math.PI, Math.PI, 36)), 36)).toMatchObject({
      value: expect.closeTo(0, 10) as number,
      freedom: 6,
    })
    const half = flatLikelihoodRatio(counts, Float64Array.from(edgesOf(-Math.PI, 0, 36)), 1000)
    // All of 1,000 samples in half of the turn: 2N ln 2.
    expect(half?.value).toBeCloseTo(2000 * Math.LN2, 6)
    expect(half?.freedom).toBe(36)
    expect(flatLikelihoodRatio(counts, Float64Array.from(edgesOf(-Math.PI, Math.PI, 36)), 8)).toBeNull()
  })
})
