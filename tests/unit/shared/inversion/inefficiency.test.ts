import { describe, expect, it } from 'vitest'
import { type BlockInefficiency, createHistogram, type Histogram } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert, type InversionSettings } from '@shared/inversion'
import { edgesOf } from '../../../support/exact-histograms'

const TEMPERATURE = 400
const TOTAL = 90_000
const blocks: BlockInefficiency = { kind: 'chain', count: 20, inefficiency: 9, deviation: 2 }

function angle(more: Partial<Pick<Histogram, 'independentSamples' | 'blocks' | 'content'>> = {}): Histogram {
  const edges = edgesOf(0, Math.PI, 90)
  const shares = edges.slice(1).map((edge, bin) => {
    const theta = (edge + edges[bin]) / 2
    return Math.sin(theta) * Math.exp(-8 * (theta - 2.1) ** 2)
  })
  const total = shares.reduce((sum, share) => sum + share, 0)
  const weights = shares.map((share) => (TOTAL * share) / total)
  return createHistogram({ kind: 'angle', edges, weights, content: 'count', ...more })
}

const inverted = (histogram: Histogram, settings: Partial<InversionSettings> = {}) =>
  invert(histogram, TEMPERATURE, { ...DEFAULT_INVERSION_SETTINGS, ...settings })

describe('the statistical inefficiency of an inversion', () => {
  it('is the one stated, before stated samples, before blocks, before 1', () => {
    const both = angle({ independentSamples: 30_000, blocks })
    expect(inverted(both, { inefficiency: 5 }).inefficiency).toEqual({
      value: 5,
      source: 'stated',
      deviation: null,
    })
    expect(inverted(both).inefficiency).toMatchObject({ source: 'independent samples' })
    expect(inverted(both).independentSamples).toBe(30_000)
    expect(inverted(angle({ blocks })).inefficiency).toEqual({ value: 9, source: 'chains', deviation: 2 })
    expect(inverted(angle({ blocks: { ...blocks, kind: 'time' } })).inefficiency).toMatchObject({
      source: 'time blocks',
    })
    expect(inverted(angle()).inefficiency).toEqual({ value: 1, source: 'assumed', deviation: null })
  })

  it('divides the counts', () => {
    expect(inverted(angle(), { inefficiency: 5 }).independentSamples).toBeCloseTo(TOTAL / 5, 6)
    expect(inverted(angle({ blocks })).independentSamples).toBeCloseTo(TOTAL / 9, 6)
  })

  it('widens the raw error band by its root, bin by bin', () => {
    const off = { smoothing: { mode: 'off' } } as const
    const [narrow, wide] = [inverted(angle(), off), inverted(angle({ blocks }), off)]
    let compared = 0
    narrow.bins.deviations!.forEach((deviation, bin) => {
      // With fewer counts one more bin at each end says nothing.
      if (!(deviation > 0 && wide.bins.deviations![bin] > 0)) return
      compared += 1
      // Both bands are kT √(1/n + 1/n_min) with the same counts, divided by 9 in one of them: exact.
      expect(wide.bins.deviations![bin] / deviation).toBeCloseTo(3, 9)
    })
    expect(compared).toBeGreaterThan(40)
  })

  it('widens the band of a smoothed curve by its root where λ keeps its share of the counts', () => {
    // The penalised Hessian is linear in counts and λ: with both divided by g, the covariance is g times as large.
    const narrow = inverted(angle(), { smoothing: { mode: 'manual', log10Lambda: 4 + Math.log10(9) } })
    const wide = inverted(angle({ blocks }), { smoothing: { mode: 'manual', log10Lambda: 4 } })
    const middle = [45, 52, 66, 72].map((bin) => wide.bins.deviations![bin] / narrow.bins.deviations![bin])
    // log₁₀ λ is rounded to 0.01 before the fit: 1 % of λ, well below 1 % of the band.
    middle.forEach((ratio) => expect(Math.abs(ratio / 3 - 1)).toBeLessThan(0.01))
  })

  it('is noted when nobody said anything, and only then', () => {
    const codes = (histogram: Histogram, settings = {}) =>
      inverted(histogram, settings).notes.map(({ code }) => code)
    expect(codes(angle())).toEqual(['COUNTS_TAKEN_AS_INDEPENDENT'])
    expect(codes(angle(), { inefficiency: 1 })).toEqual([])
    expect(codes(angle({ blocks }))).toEqual([])
    expect(codes(angle({ independentSamples: 1000 }))).toEqual([])
    expect(codes(angle({ content: 'probability' }))).toEqual([])
  })

  it('helps no probability, which has no counts to divide', () => {
    const found = inverted(angle({ content: 'probability' }), { inefficiency: 5 })
    expect(found).toMatchObject({ inefficiency: null, independentSamples: null })
  })

  it('is refused below 1 and beyond the limit', () => {
    for (const inefficiency of [0.5, NaN, 1e7]) {
      expect(() => inverted(angle(), { inefficiency })).toThrow(
        expect.objectContaining({ code: 'SETTING_INVALID', place: { field: 'inefficiency' } }),
      )
    }
  })
})
