import { describe, expect, it } from 'vitest'
import { correlate, informationDeviation } from '@shared/correlation'
import { accumulateJoint, createJointHistogram } from '@shared/histogram'
import { createRandom } from '@shared/numeric/random'

const edges = Float64Array.from({ length: 31 }, (_, i) => 1 + i * 0.02)

/** Pairs of normal numbers with the correlation asked for, about 1.3. */
function sample(seed: number, correlation = 0.5, pairs = 2000) {
  const random = createRandom(seed)
  const within = (value: number) => Math.min(1.59, Math.max(1.01, 1.3 + 0.06 * value))
  const [xs, ys] = [new Float64Array(pairs), new Float64Array(pairs)]
  for (let i = 0; i < pairs; i += 1) {
    const shared = random.normal()
    xs[i] = within(shared)
    ys[i] = within(correlation * shared + Math.sqrt(1 - correlation ** 2) * random.normal())
  }
  const weights = accumulateJoint(xs, ys, edges, edges)
  return correlate(
    createJointHistogram({
      kinds: ['angle', 'angle'],
      xEdges: edges,
      yEdges: edges,
      weights,
      content: 'count',
    }),
  )
}

describe('informationDeviation', () => {
  it('is the scatter of the number over repeated measurements', () => {
    const all = Array.from({ length: 40 }, (_, seed) => sample(seed + 1))
    const numbers = all.map(({ mutualInformationCorrected }) => mutualInformationCorrected!)
    const mean = numbers.reduce((sum, value) => sum + value, 0) / numbers.length
    const scatter = Math.sqrt(numbers.reduce((sum, value) => sum + (value - mean) ** 2, 0) / 39)
    const stated = informationDeviation(all[0])!
    // The scatter of 40 is known to 11 %; the linear estimate is good to some 20 % at this size.
    expect(stated / scatter).toBeGreaterThan(0.65)
    expect(stated / scatter).toBeLessThan(1.5)
  })

  it('does not vanish for unrelated terms, whose first-order variance does', () => {
    expect(informationDeviation(sample(1, 0))).toBeGreaterThan(0.001)
  })

  it('falls with the square root of the number of samples', () => {
    const few = informationDeviation(sample(1, 0.7, 2000))!
    const many = informationDeviation(sample(1, 0.7, 8000))!
    expect(few / many).toBeGreaterThan(1.7)
    expect(few / many).toBeLessThan(2.4)
  })

  it('is unknown without a sample size', () => {
    const counted = sample(1)
    expect(informationDeviation({ ...counted, independentSamples: null })).toBeNull()
  })
})
