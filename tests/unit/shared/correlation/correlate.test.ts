import fc from 'fast-check'
import { sampleCorrelation } from 'simple-statistics'
import { describe, expect, it } from 'vitest'
import { correlate } from '@shared/correlation'
import { mergeBins, mergeCells, mergeThinBins } from '@shared/correlation/merge-bins'
import { marginalsOf, mutualInformation } from '@shared/correlation/mutual-information'
import { nullDistribution } from '@shared/correlation/null-tables'
import { fillRandomTable } from '@shared/correlation/random-table'
import { createJointHistogram, type JointHistogram } from '@shared/histogram'
import { createRandom } from '@shared/numeric'
import { edgesOf } from '../../../support/exact-histograms'

const NX = 12
const NY = 10
const xEdges = Float64Array.from(edgesOf(0.3, 0.42, NX))
const yEdges = Float64Array.from(edgesOf(1.5, 2.5, NY))

function joint(
  weight: (x: number, y: number) => number,
  content: 'count' | 'density' = 'count',
): JointHistogram {
  const weights = Array.from({ length: NX * NY }, (_, cell) => weight(Math.floor(cell / NY), cell % NY))
  return createJointHistogram({ kinds: ['bond', 'angle'], xEdges, yEdges, weights, content })
}
const product = (x: number, y: number) => 200 * Math.exp(-((x - 6) ** 2) / 8 - (y - 5) ** 2 / 6)
const ridge = (x: number, y: number) => 200 * Math.exp(-((x - y * 1.2) ** 2) / 3)

describe('correlate', () => {
  it('finds nothing in a product and much on a ridge', () => {
    const none = correlate(joint(product))
    expect(none.mutualInformation).toBeCloseTo(0, 10)
    expect(none.verdict).toBe('separable')
    expect(none.totalVariation).toBeCloseTo(0, 10)
    const much = correlate(joint(ridge))
    expect(much.verdict).toBe('joint')
    expect(much.mutualInformationCorrected).toBeGreaterThan(0.1)
    expect(much.pValue).toBeLessThan(0.01)
  })

  it('gives no verdict without a sample size, or with too few samples', () => {
    const unknown = correlate(joint(ridge, 'density'))
    expect(unknown).toMatchObject({
      verdict: 'undecided',
      independentSamples: null,
      pValue: null,
      nullMean: null,
    })
    expect(unknown.warnings.map(({ code }) => code)).toContain('SAMPLE_SIZE_UNKNOWN')
    expect(correlate(joint(product), { independentSamples: 40 }).verdict).toBe('undecided')
  })

  it('is the same for the same seed and, but for the null tables, for swapped axes', () => {
    const histogram = joint(ridge)
    expect(correlate(histogram, { seed: 3 })).toEqual(correlate(histogram, { seed: 3 }))
    const swapped = createJointHistogram({
      kinds: ['angle', 'bond'],
      xEdges: yEdges,
      yEdges: xEdges,
      weights: Array.from({ length: NX * NY }, (_, cell) => ridge(cell % NX, Math.floor(cell / NX))),
      content: 'count',
    })
    const [one, other] = [correlate(histogram), correlate(swapped)]
    expect(other.mutualInformation).toBeCloseTo(one.mutualInformation, 12)
    expect(other.pearson).toBeCloseTo(one.pearson ?? NaN, 12)
    expect(other.totalVariation).toBeCloseTo(one.totalVariation, 12)
  })

  it('agrees with simple-statistics on Pearson’s coefficient of the bin midpoints', () => {
    const histogram = joint((x, y) => Math.round(ridge(x, y) / 20))
    const [xs, ys]: [number[], number[]] = [[], []]
    histogram.weights.forEach((count, cell) => {
      for (let copy = 0; copy < count; copy++) {
        xs.push(Math.floor(cell / NY))
        ys.push(cell % NY)
      }
    })
    expect(correlate(histogram).pearson).toBeCloseTo(sampleCorrelation(xs, ys), 10)
  })

  it('follows the mean of the angle along the bond', () => {
    const means = correlate(joint(ridge)).conditionalMean.map(({ mean }) => mean)
    expect(means[9]).toBeGreaterThan(means[2] + 0.3)
    correlate(joint(product)).conditionalMean.forEach(({ mean }) => expect(mean).toBeCloseTo(2.05, 2))
  })

  it('draws a coupling map with values only where enough is expected', () => {
    const { coupling, largestCoupling } = correlate(joint(ridge))
    expect([...coupling.values].every(Number.isFinite)).toBe(true)
    expect(Math.abs(largestCoupling?.value ?? 0)).toBeGreaterThan(0.5)
    const thin = correlate(joint(ridge), { independentSamples: 30 })
    expect([...thin.coupling.values].every(Number.isNaN)).toBe(true)
    expect(thin.largestCoupling).toBeNull()
  })

  it('refuses a number of independent samples above the counts', () => {
    expect(() => correlate(joint(product), { independentSamples: 1e9 })).toThrow(
      expect.objectContaining({ code: 'SETTING_INVALID' }),
    )
  })
})

describe('its parts', () => {
  const counts = fc.array(fc.integer({ min: 0, max: 20 }), { minLength: 12, maxLength: 12 })

  it('mutual information is never negative and 0 for a product of its margins', () => {
    fc.assert(
      fc.property(counts, (cells) => {
        const total = cells.reduce((sum, count) => sum + count, 0)
        fc.pre(total > 0)
        const masses = Float64Array.from(cells, (count) => count / total)
        expect(mutualInformation(masses, 4)).toBeGreaterThanOrEqual(-1e-12)
        const { x, y } = marginalsOf(masses, 4)
        const independent = Float64Array.from(
          { length: 12 },
          (_, cell) => x[Math.floor(cell / 4)] * y[cell % 4],
        )
        expect(Math.abs(mutualInformation(independent, 4))).toBeLessThan(1e-12)
      }),
    )
  })

  it('random tables keep both margins', () => {
    fc.assert(
      fc.property(counts, fc.integer({ min: 0, max: 1e6 }), (cells, seed) => {
        const { x, y } = marginalsOf(Float64Array.from(cells), 4)
        const table = new Float64Array(12)
        fillRandomTable(createRandom(seed), x, y, table)
        const drawn = marginalsOf(table, 4)
        expect([...drawn.x]).toEqual([...x])
        expect([...drawn.y]).toEqual([...y])
      }),
    )
  })

  it('merging bins keeps the mass', () => {
    const histogram = joint(product)
    const { x, y } = marginalsOf(histogram.weights, NY)
    const [mergedX, mergedY] = [mergeBins(x, xEdges, 5), mergeBins(y, yEdges, 4)]
    const merged = mergeCells(histogram.weights, mergedX, mergedY)
    const sum = (values: Float64Array) => values.reduce((all, value) => all + value, 0)
    expect(sum(merged)).toBeCloseTo(sum(histogram.weights), 6)
    expect(mergedX.edges[0]).toBe(xEdges[0])
    expect(mergedX.edges.at(-1)).toBe(xEdges[NX])
  })

  it('merging thin bins leaves bins few enough alone, and else comes down to what was asked for', () => {
    fc.assert(
      fc.property(
        fc.array(fc.nat(50), { minLength: 1, maxLength: 60 }),
        fc.integer({ min: 1, max: 60 }),
        (bins, most) => {
          const masses = Float64Array.from(bins)
          const filled = bins.filter((mass) => mass > 0).length
          fc.pre(filled > 0)
          const { groups, edges, count } = mergeThinBins(
            masses,
            Float64Array.from(edgesOf(0, 1, bins.length)),
            most,
          )
          expect(count).toBeLessThanOrEqual(most)
          expect(edges).toHaveLength(count + 1)
          if (filled <= most) expect(count).toBe(filled)
          bins.forEach((mass, bin) => mass > 0 && expect(groups[bin]).toBeGreaterThanOrEqual(0))
        },
      ),
    )
  })

  it('merges the thin tails of many bins and not their middle', () => {
    const masses = Float64Array.from({ length: 41 }, (_, bin) => Math.exp(-((bin - 20) ** 2) / 50))
    const { edges, count } = mergeThinBins(masses, Float64Array.from(edgesOf(0, 41, 41)), 40)
    expect(count).toBe(40)
    expect(edges).toContain(20)
    expect(edges).toContain(21)
  })

  it('null tables of more samples than are drawn show what as many samples would', () => {
    // Equal margins: the mean tends to (rows − 1)(columns − 1)/(2N) (Wilks 1938; from memory). 200 tables know it to 0.4 %.
    const cells = new Float64Array(30 * 30).fill(1 / 900)
    for (const samples of [80_000, 1_000_000]) {
      const { mean, totalVariationMean } = nullDistribution(cells, 30, samples, 1)
      expect(Math.abs((mean * 2 * samples) / 29 ** 2 - 1)).toBeLessThan(0.02)
      // Each cell misses its mean by a normal number of variance e(1 − 1/30)²: ½ Σ √(2/π · e)/N.
      const variation = (900 / 2) * Math.sqrt((2 / Math.PI) * (samples / 900)) * (29 / 30 / samples)
      expect(Math.abs(totalVariationMean / variation - 1)).toBeLessThan(0.02)
    }
  })
})
