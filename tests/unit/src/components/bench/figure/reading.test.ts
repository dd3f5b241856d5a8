import { describe, expect, it } from 'vitest'
import { potentialEnergy, potentialSlope } from '@shared/inversion'
import { GAS_CONSTANT } from '@shared/units'
import type { DisplayUnits } from '@/components/figure/coordinate-names'
import { figureModel } from '@/components/bench/figure/figure-model'
import { edgeDecimals, readingAt } from '@/components/bench/figure/reading'
import { angleCounts, dihedralCounts, inverted, TEMPERATURE, withoutSampleSize } from '../distributions'

const units: DisplayUnits = { length: 'nm', angle: 'degree', energy: 'kcal/mol' }
const BIN = 35

const read = (histogram = angleCounts(), bin = BIN) => {
  const inversion = inverted(histogram)
  return { inversion, reading: readingAt(histogram, inversion, figureModel(inversion, units), units, bin) }
}

describe('readingAt', () => {
  it('reads the potential at the middle of the bin, in the units shown', () => {
    const { inversion, reading } = read()
    const middle = (131 * Math.PI) / 180
    expect(reading.coordinate).toBeCloseTo(131, 9)
    expect([reading.low, reading.high]).toEqual([expect.closeTo(130, 9), expect.closeTo(132, 9)])
    expect(reading.energy).toBeCloseTo(potentialEnergy(inversion.potential, middle) / 4.184, 9)
    expect(reading.thermal).toBeCloseTo((reading.energy * 4.184) / (GAS_CONSTANT * TEMPERATURE), 9)
    expect(reading.force).toBeCloseTo(
      (-potentialSlope(inversion.potential, middle) / 4.184) * (Math.PI / 180),
      9,
    )
  })

  it('counts what is in the bin, and its part of the independent samples', () => {
    const histogram = angleCounts()
    const { reading } = read(histogram)
    expect(reading.counts).toBe(histogram.weights[BIN])
    expect(reading.independent).toBeCloseTo(histogram.weights[BIN] / 10, 0)
  })

  it('states no counts, no independent samples and no error for a density of unknown size', () => {
    const { reading } = read(withoutSampleSize(angleCounts()))
    expect([reading.counts, reading.independent, reading.halfWidth]).toEqual([null, null, null])
    expect(reading.share).toBeGreaterThan(0)
  })

  it('reads the residual of the bin, and none without a sample size', () => {
    const histogram = angleCounts()
    const { inversion, reading } = read(histogram)
    const independent = histogram.independentSamples!
    const expected = inversion.regenerated[BIN] * independent
    expect(reading.residual).toBeCloseTo((reading.independent! - expected) / Math.sqrt(expected), 9)
    expect(read(withoutSampleSize(histogram)).reading.residual).toBeNull()
  })

  it('gives an error where data are, and none where the curve is extrapolated', () => {
    expect(read().reading.halfWidth).toBeGreaterThan(0)
    expect(read(angleCounts(), 0).reading.halfWidth).toBeNull()
    expect(read(angleCounts(), 0).reading.density).toBeNull()
  })

  it('has no comparison for a dihedral, whose Jacobian is constant', () => {
    expect(read(dihedralCounts(), 3).reading.comparison).toBeNull()
    expect(read().reading.comparison).not.toBeNull()
  })
})

describe('edgeDecimals', () => {
  it('writes every edge exactly with as few decimals as that takes', () => {
    expect(edgeDecimals([60, 62, 64])).toBe(0)
    expect(edgeDecimals([60, 60.5, 61])).toBe(1)
    expect(edgeDecimals([0.24, 0.2405, 0.241])).toBe(4)
  })

  it('stops one decimal behind the width of crooked bins', () => {
    expect(edgeDecimals([Math.PI / 3, Math.PI / 2, Math.PI])).toBeLessThanOrEqual(3)
  })
})
