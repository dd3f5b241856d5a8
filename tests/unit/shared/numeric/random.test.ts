import { describe, expect, it } from 'vitest'
import { InvalidInputError } from '@shared/errors'
import { createRandom } from '@shared/numeric/random'

const DRAWS = 40_000

function moments(draw: () => number): { mean: number; variance: number } {
  let sum = 0
  let squares = 0
  for (let i = 0; i < DRAWS; i++) {
    const value = draw()
    sum += value
    squares += value * value
  }
  const mean = sum / DRAWS
  return { mean, variance: squares / DRAWS - mean * mean }
}

describe('createRandom', () => {
  it('gives the same stream for the same seed and another one for the next seed', () => {
    const draw = (seed: number) => {
      const random = createRandom(seed)
      return Array.from({ length: 20 }, () => random.uniform())
    }
    expect(draw(11)).toEqual(draw(11))
    expect(draw(11)).not.toEqual(draw(12))
  })

  it('refuses a seed that is not a whole number of 32 bits', () => {
    for (const seed of [-1, 0.5, 2 ** 32, NaN]) {
      expect(() => createRandom(seed)).toThrow(InvalidInputError)
    }
  })

  // The standard error of a mean over n draws is σ/√n; five of them are allowed, for a stream that is fixed anyway.
  it('draws uniform numbers in [0, 1) with mean 1/2 and variance 1/12', () => {
    const random = createRandom(1)
    const { mean, variance } = moments(() => {
      const value = random.uniform()
      if (value < 0 || value >= 1) throw new RangeError(`${value} is outside [0, 1)`)
      return value
    })
    expect(Math.abs(mean - 0.5)).toBeLessThan((5 * Math.sqrt(1 / 12)) / Math.sqrt(DRAWS))
    expect(Math.abs(variance - 1 / 12)).toBeLessThan(0.002)
  })

  it('draws normal numbers with mean 0 and variance 1', () => {
    const random = createRandom(2)
    const { mean, variance } = moments(() => random.normal())
    expect(Math.abs(mean)).toBeLessThan(5 / Math.sqrt(DRAWS))
    expect(Math.abs(variance - 1)).toBeLessThan(5 * Math.sqrt(2 / DRAWS))
  })

  it.each([0.3, 4, 9.99, 10, 35, 1e4])('draws Poisson numbers whose mean and variance are %d', (lambda) => {
    const random = createRandom(3)
    const { mean, variance } = moments(() => random.poisson(lambda))
    expect(Math.abs(mean - lambda)).toBeLessThan(5 * Math.sqrt(lambda / DRAWS))
    // Var(s²) = (λ + 2λ²)/n for Poisson numbers
    expect(Math.abs(variance - lambda)).toBeLessThan(5 * Math.sqrt((lambda + 2 * lambda * lambda) / DRAWS))
  })

  it('draws nothing at a Poisson mean of zero', () => {
    expect(createRandom(4).poisson(0)).toBe(0)
  })

  it('draws every whole number below a bound equally often', () => {
    const random = createRandom(5)
    const counts = new Array<number>(7).fill(0)
    for (let i = 0; i < DRAWS; i++) counts[random.integer(7)]++
    const expected = DRAWS / 7
    const chiSquare = counts.reduce((sum, count) => sum + (count - expected) ** 2 / expected, 0)
    expect(chiSquare).toBeLessThan(22.5) // 99.9th percentile of χ² with 6 degrees of freedom
  })
})
