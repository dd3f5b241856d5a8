import { describe, expect, it } from 'vitest'
import { createRandom } from '@shared/numeric/random'
import { inefficiencyBetweenChains } from '../../../../server/demo/chain-scatter'

/** Chains of draws over ten bins, each draw counted `repeats` times over. */
function chainsOfRepeats(repeats: number) {
  const random = createRandom(5)
  return Array.from({ length: 200 }, () => {
    const row = new Float64Array(10)
    for (let i = 0; i < 300; i++) row[random.integer(10)] += repeats
    return row
  })
}

describe('inefficiencyBetweenChains', () => {
  // Spread of the estimate: √(2/199/9) = 3.3 %; the bounds are three of those.
  it('is 1 for independent samples', () => {
    expect(inefficiencyBetweenChains(chainsOfRepeats(1))).toBeGreaterThanOrEqual(1)
    expect(inefficiencyBetweenChains(chainsOfRepeats(1))).toBeLessThan(1.1)
  })

  it('is the number of times every sample was counted', () => {
    const g = inefficiencyBetweenChains(chainsOfRepeats(7))
    expect(Math.abs(g / 7 - 1)).toBeLessThan(0.1)
  })

  it('is never below 1, however alike the chains are', () => {
    const alike = Array.from({ length: 20 }, () => Float64Array.of(10, 20, 30))
    expect(inefficiencyBetweenChains(alike)).toBe(1)
  })
})
