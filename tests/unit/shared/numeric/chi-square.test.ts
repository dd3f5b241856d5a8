import { describe, expect, it } from 'vitest'
import { createRandom } from '@shared/numeric'
import { chiSquareSurvival } from '@shared/numeric/chi-square'

describe('chiSquareSurvival', () => {
  it('is a sum of Poisson probabilities for an even number of degrees of freedom (analytic)', () => {
    for (const freedom of [2, 4, 10, 70, 400]) {
      for (const share of [0.01, 0.3, 0.9, 1, 1.1, 1.5, 3]) {
        const half = (share * freedom) / 2
        let [term, sum] = [Math.exp(-half), 0]
        for (let n = 0; n < freedom / 2; n++) {
          sum += term
          term *= half / (n + 1)
        }
        // exp and ln of numbers about 200 cost some 1e-13; below x = k the complement of the series costs its ulp.
        expect(Math.abs(chiSquareSurvival(2 * half, freedom) - sum)).toBeLessThan(1e-11 * sum + 1e-15)
      }
    }
  })

  it('has the critical values of printed tables for odd numbers', () => {
    // Upper 5 % and 1 % points: Abramowitz & Stegun 1964, table 26.8 (from memory).
    for (const [x, freedom, share] of [
      [3.841459, 1, 0.05],
      [6.634897, 1, 0.01],
      [7.814728, 3, 0.05],
      [11.344867, 3, 0.01],
      [49.80185, 35, 0.05],
    ]) {
      expect(chiSquareSurvival(x, freedom)).toBeCloseTo(share, 6)
    }
  })

  it('falls from 1 to 0 and knows no value in between twice', () => {
    expect(chiSquareSurvival(0, 5)).toBe(1)
    expect(chiSquareSurvival(5000, 5)).toBe(0)
    let before = 1
    for (let x = 0.5; x < 200; x += 0.5) {
      const value = chiSquareSurvival(x, 71)
      expect(value).toBeLessThanOrEqual(before)
      before = value
    }
  })

  it('is the share of sums of squared normal numbers that lie above', () => {
    const random = createRandom(4)
    const above = Array.from({ length: 20_000 }, () => {
      const sum = Array.from({ length: 5 }, () => random.normal() ** 2).reduce(
        (all, square) => all + square,
        0,
      )
      return sum > 6 ? 1 : 0
    }).reduce<number>((all, one) => all + one, 0)
    // four standard errors of a share of 20,000
    expect(Math.abs(above / 20_000 - chiSquareSurvival(6, 5))).toBeLessThan(0.014)
  })
})
