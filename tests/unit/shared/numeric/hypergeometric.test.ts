import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { hypergeometric } from '@shared/numeric/hypergeometric'
import { createRandom } from '@shared/numeric/random'

describe('hypergeometric', () => {
  it('stays within what the urn holds', () => {
    const size = fc.integer({ min: 0, max: 2000 })
    fc.assert(
      fc.property(
        size,
        size,
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.nat(),
        (marked, plain, share, seed) => {
          const drawn = Math.floor(share * (marked + plain))
          const value = hypergeometric(createRandom(seed), marked, plain, drawn)
          return value >= Math.max(0, drawn - plain) && value <= Math.min(marked, drawn)
        },
      ),
    )
  })

  it.each([
    [5, 8, 6],
    [300, 700, 90],
    [20_000, 60_000, 30_000],
    [900_000, 100_000, 500_000],
  ])('has the mean and variance of an urn with %d marked, %d plain, %d drawn', (marked, plain, drawn) => {
    const random = createRandom(9)
    const draws = 20_000
    let sum = 0
    let squares = 0
    const total = marked + plain
    const mean = (drawn * marked) / total
    for (let i = 0; i < draws; i++) {
      const difference = hypergeometric(random, marked, plain, drawn) - mean
      sum += difference
      squares += difference * difference
    }
    const variance = (mean * (plain / total) * (total - drawn)) / (total - 1)
    // five standard errors; the fourth moment is close to that of a normal number
    expect(Math.abs(sum / draws)).toBeLessThan(5 * Math.sqrt(variance / draws))
    expect(Math.abs(squares / draws / variance - 1)).toBeLessThan(5 * Math.sqrt(2 / draws))
  })

  it('has the probabilities of a small urn', () => {
    // 3 marked, 2 plain, 2 drawn: P(0) = 1/10, P(1) = 6/10, P(2) = 3/10
    const random = createRandom(10)
    const counts = [0, 0, 0]
    for (let i = 0; i < 30_000; i++) counts[hypergeometric(random, 3, 2, 2)]++
    const chiSquare = [3000, 18000, 9000].reduce((sum, e, i) => sum + (counts[i] - e) ** 2 / e, 0)
    expect(chiSquare).toBeLessThan(13.8) // 99.9th percentile of χ² with 2 degrees of freedom
  })
})
