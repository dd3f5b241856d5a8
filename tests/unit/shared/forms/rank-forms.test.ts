import { describe, expect, it } from 'vitest'
import { formsOfKind, type RankedFit, rankForms } from '@shared/forms'
import { createHistogram } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert } from '@shared/inversion'
import {
  COSINE_ANGLE,
  HARMONIC_ANGLE,
  HARMONIC_BOND,
  MORSE_BOND,
  QUARTIC_BOND,
  sampled,
  SKEWED_TURN,
  TEMPERATURE,
  THREE_COSINES,
  TWO_STATES,
} from './samples'

const SAMPLES = 50_000

describe('a ranking', () => {
  it.each([
    ['harmonic', HARMONIC_BOND],
    ['morse', MORSE_BOND],
    ['quartic', QUARTIC_BOND],
    ['gaussians', TWO_STATES],
    ['harmonic', HARMONIC_ANGLE],
    ['cosine-harmonic', COSINE_ANGLE],
    ['cosine-series', THREE_COSINES],
    ['cosine-series-phases', SKEWED_TURN],
  ] as const)('puts the true form first: %s', (form, term) => {
    const [best] = rankForms(sampled(term, SAMPLES), TEMPERATURE).candidates
    expect(best).toMatchObject({ outcome: 'fitted', form })
    const noisy = rankForms(sampled(term, SAMPLES, 2), TEMPERATURE).candidates
    const { deltaAic } = noisy.find((candidate) => candidate.form === form) as RankedFit
    // A form that holds the true one gains by chance: two more parameters reach 10 in 2 ln L once in 150 times, so 6 in AIC.
    expect(deltaAic).toBeLessThan(6)
  })

  it('holds every form of the kind once, by ascending AIC, the refused ones last with a reason', () => {
    for (const term of [HARMONIC_BOND, COSINE_ANGLE, SKEWED_TURN]) {
      const { candidates } = rankForms(sampled(term, SAMPLES, 3), TEMPERATURE)
      expect(candidates.map(({ form }) => form).sort()).toEqual([...formsOfKind(term.kind)].sort())
      const outcomes = candidates.map(({ outcome }) => outcome)
      expect(outcomes).toEqual([...outcomes].sort())
      const steps = candidates.map((candidate) => (candidate.outcome === 'fitted' ? candidate.deltaAic : NaN))
      expect(steps.filter((step) => !Number.isNaN(step))).toEqual(
        steps.filter((step) => !Number.isNaN(step)).sort((one, other) => (one ?? 0) - (other ?? 0)),
      )
      candidates.forEach((candidate) => {
        if (candidate.outcome === 'refused') expect(candidate.message).toMatch(/\.$/)
      })
    }
  })

  it('says which numbers of terms it compared, and takes a given one as it is', () => {
    const histogram = sampled(THREE_COSINES, SAMPLES, 4)
    const series = (terms: { 'cosine-series'?: number }) =>
      rankForms(histogram, TEMPERATURE, { terms }).candidates.find(
        ({ form }) => form === 'cosine-series',
      ) as RankedFit
    const chosen = series({})
    expect(chosen.tried.map(({ terms }) => terms)).toEqual([1, 2, 3, 4, 5, 6])
    expect(chosen.aic).toBe(Math.min(...chosen.tried.map(({ aic }) => aic ?? Infinity)))
    expect(series({ 'cosine-series': 5 })).toMatchObject({ terms: 5, tried: [] })
  })

  it('measures the largest deviation from a reference where the data live', () => {
    const histogram = sampled(COSINE_ANGLE, 1e7)
    const { potential } = invert(histogram, TEMPERATURE, DEFAULT_INVERSION_SETTINGS)
    const { candidates } = rankForms(histogram, TEMPERATURE, { reference: potential })
    const deviationOf = (wanted: string) =>
      (candidates.find(({ form }) => form === wanted) as RankedFit).largestDeviation?.value ?? NaN
    // The true form differs from the smooth curve by the error of the latter, a few thousandths of kT.
    expect(deviationOf('cosine-harmonic')).toBeLessThan(0.01)
    expect(deviationOf('harmonic')).toBeGreaterThan(0.5)
    expect((candidates[0] as RankedFit).largestDeviation?.coordinate).toBeGreaterThan(1)
  })

  it('has chi-squares near their freedom for the true form, and far above for a wrong one', () => {
    const { candidates } = rankForms(sampled(HARMONIC_ANGLE, SAMPLES, 6), TEMPERATURE)
    const ratio = (wanted: string) => {
      const { goodness } = candidates.find(({ form }) => form === wanted) as RankedFit
      return (goodness?.chiSquare ?? NaN) / (goodness?.freedom ?? NaN)
    }
    // About 50 groups: the ratio scatters by √(2/50) = 0.2.
    expect(Math.abs(ratio('harmonic') - 1)).toBeLessThan(0.6)
    expect(ratio('cosine-harmonic')).toBeGreaterThan(2)
  })
})

describe('a ranking without a sample size', () => {
  const { kind, edges, weights } = sampled(HARMONIC_BOND, 1e5)
  const density = createHistogram({ kind, edges, weights, content: 'probability' })

  it('has parameters, but neither errors nor AIC nor an order, and says so', () => {
    const { candidates, warnings, independentSamples, inefficiency } = rankForms(density, TEMPERATURE)
    expect(independentSamples).toBeNull()
    expect(inefficiency).toBeNull()
    expect(warnings.map(({ code }) => code)).toContain('RANKING_UNKNOWN')
    const harmonic = candidates.find(({ form }) => form === 'harmonic') as RankedFit
    expect(harmonic).toMatchObject({
      aic: null,
      deltaAic: null,
      covariance: null,
      goodness: null,
      logLikelihood: null,
    })
    expect(harmonic.parameters.map(({ standardError }) => standardError)).toEqual([null, null])
    expect(harmonic.parameters[0].value / 5000).toBeCloseTo(1, 4)
  })

  it('has them once it is stated, the same as counts have', () => {
    const stated = createHistogram({ kind, edges, weights, content: 'probability', independentSamples: 500 })
    const counted = createHistogram({ kind, edges, weights, content: 'count', independentSamples: 500 })
    const [one, other] = [stated, counted].map(
      (histogram) => rankForms(histogram, TEMPERATURE).candidates[0] as RankedFit,
    )
    expect(one.form).toBe(other.form)
    expect(one.aic).toBeCloseTo(other.aic ?? NaN, 8)
    expect(one.parameters[0].standardError).toBeCloseTo(other.parameters[0].standardError ?? NaN, 8)
  })
})

describe('doubts about a ranking', () => {
  it('name a range that is cut off', () => {
    const cut = sampled({ ...HARMONIC_BOND, range: [0.33, 0.5], bins: 40 }, SAMPLES)
    const { cutOff, warnings } = rankForms(cut, TEMPERATURE)
    expect(cutOff).toEqual([true, false])
    expect(warnings.find(({ code }) => code === 'RANGE_CUT_OFF')?.message).toContain('0.33 nm')
  })

  it('name a distribution that no form fits, and are silent for one that a form does', () => {
    const comb = sampled(
      { ...SKEWED_TURN, energy: (phi) => 3 * Math.cos(9 * phi) + 2 * Math.cos(8 * phi) },
      SAMPLES,
      1,
    )
    expect(rankForms(comb, TEMPERATURE).warnings.map(({ code }) => code)).toEqual(['NO_FORM_FITS'])
    expect(rankForms(sampled(HARMONIC_ANGLE, SAMPLES, 1), TEMPERATURE).warnings).toEqual([])
  })
})
