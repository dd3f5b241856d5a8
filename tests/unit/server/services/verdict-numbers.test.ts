import { describe, expect, it } from 'vitest'
import type { VerdictNumbers } from '@shared/contracts/distribution'
import { verdictAt } from '../../../../server/services/verdict-numbers'

const NUMBERS: VerdictNumbers = {
  verdict: 'borderline',
  mutualInformation: 0.051,
  mutualInformationCorrected: 0.05,
  nullMean: 0.001,
  pValue: 0.005,
  independentSamples: 50_000,
  nullPercentile99: 0.002,
  basinsBeyondProduct: 0,
}

describe('verdictAt', () => {
  it.each([
    [{ separableBelow: 0.02, jointAbove: 0.1 }, 'borderline'],
    [{ separableBelow: 0.06, jointAbove: 0.1 }, 'separable'],
    [{ separableBelow: 0.02, jointAbove: 0.045 }, 'joint'],
  ])('gives the verdict of stored numbers at thresholds set since: %o', (thresholds, verdict) => {
    expect(verdictAt(NUMBERS, thresholds)).toEqual({ ...NUMBERS, verdict })
  })

  it('advises a joint potential for basins of their own, whatever the thresholds', () => {
    const numbers = { ...NUMBERS, basinsBeyondProduct: 1 }
    expect(verdictAt(numbers, { separableBelow: 0.4, jointAbove: 0.9 }).verdict).toBe('joint')
  })

  it('leaves a verdict as it was recorded where its numbers do not say enough', () => {
    const { nullPercentile99, ...older } = NUMBERS
    expect(nullPercentile99).toBeDefined()
    for (const numbers of [older, { ...NUMBERS, nullMean: null, pValue: null, nullPercentile99: null }]) {
      expect(verdictAt(numbers, { separableBelow: 0.4, jointAbove: 0.9 })).toEqual(numbers)
    }
  })
})
