import { describe, expect, it } from 'vitest'
import { pearsonResiduals } from '@/components/bench/figure/pearson-residuals'
import { angleCounts, inverted, withoutSampleSize } from '../distributions'

const inversion = inverted(angleCounts())
const residualsOf = (weights: number[], regenerated: number[], independentSamples: number | null) =>
  pearsonResiduals({
    bins: { ...inversion.bins, weights: Float64Array.from(weights) },
    regenerated: Float64Array.from(regenerated),
    independentSamples,
  })

describe('pearsonResiduals', () => {
  it('counts the difference in errors of the expectation, worked out by hand', () => {
    // 100 independent samples: 20, 30, 50 seen where 25, 25, 50 are expected.
    expect(residualsOf([20, 30, 50], [0.25, 0.25, 0.5], 100)).toEqual(Float64Array.of(-1, 1, 0))
  })

  it('judges counts divided by the statistical inefficiency, not the counts of the file', () => {
    // The same shares from 900 counts, of which 100 are independent: g = 9, so the errors stay those of 100.
    expect(residualsOf([180, 270, 450], [0.25, 0.25, 0.5], 100)).toEqual(Float64Array.of(-1, 1, 0))
  })

  it('says minus the root of the expectation where nothing was counted', () => {
    const residuals = residualsOf([0, 100], [0.09, 0.91], 100)!
    expect(residuals[0]).toBeCloseTo(-3, 12)
  })

  it('says nothing of a bin where nothing is expected', () => {
    expect(residualsOf([0, 100], [0, 1], 100)).toEqual(Float64Array.of(NaN, 0))
  })

  it('is not known without a stated sample size', () => {
    expect(pearsonResiduals(inverted(withoutSampleSize(angleCounts())))).toBeNull()
  })

  it('stays small where the curve follows data without noise', () => {
    // Rounded expected counts of a smooth potential: no residual comes near one error.
    expect(Math.max(...pearsonResiduals(inversion)!.map(Math.abs))).toBeLessThan(0.5)
  })
})
