import { describe, expect, it } from 'vitest'
import { nextTick, shallowRef } from 'vue'
import type { Histogram } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { binOf, useBenchReading } from '@/composables/useBenchReading'
import type { InversionAnswer } from '@/workers'
import { runInversion } from '@/workers/inversion-task'
import { angleCounts, bondCounts, TEMPERATURE } from '../components/bench/distributions'

const answerTo = (histogram: Histogram): InversionAnswer =>
  runInversion({
    histogram,
    temperature: TEMPERATURE,
    settings: DEFAULT_INVERSION_SETTINGS,
    basinDepth: 0.5,
    flatBelow: 0.5,
  }).answer!

const set = () => {
  const histogram = shallowRef<Histogram | null>(angleCounts())
  const answer = shallowRef<InversionAnswer | null>(answerTo(histogram.value!))
  const reading = useBenchReading(
    () => histogram.value,
    () => answer.value,
  )
  return { histogram, answer, reading }
}

describe('useBenchReading', () => {
  it('starts where the potential is least', () => {
    const { reading, answer } = set()
    const { edges } = answer.value!.inversion.bins
    const { coordinate } = answer.value!.inversion.minimum
    expect(edges[reading.bin.value!]).toBeLessThanOrEqual(coordinate)
    expect(edges[reading.bin.value! + 1]).toBeGreaterThan(coordinate)
  })

  it('moves by bins and stops at both ends', () => {
    const { reading } = set()
    reading.go(58)
    reading.move(5)
    expect(reading.bin.value).toBe(59)
    reading.move(-200)
    expect(reading.bin.value).toBe(0)
  })

  it('follows a coordinate in the unit on screen', () => {
    const { reading } = set()
    reading.point(131.3, 'degree')
    expect(reading.bin.value).toBe(35)
  })

  it('starts anew with another histogram', async () => {
    const { reading, histogram, answer } = set()
    reading.go(0)
    histogram.value = bondCounts()
    answer.value = answerTo(histogram.value)
    await nextTick()
    // 0.3 nm is the edge between bins 19 and 20; the Jacobian moves the maximum of the counts, not of the potential.
    expect([19, 20]).toContain(reading.bin.value)
  })

  it('reads nothing without data', () => {
    const { reading, histogram } = set()
    histogram.value = null
    expect(reading.bin.value).toBeNull()
  })
})

describe('binOf', () => {
  const edges = Float64Array.of(0, 1, 2, 3)

  it('takes bins as half-open, the last one closed', () => {
    expect([0, 0.5, 1, 2.9, 3].map((coordinate) => binOf(edges, coordinate))).toEqual([0, 0, 1, 2, 2])
  })

  it('takes the end bin for what lies outside', () => {
    expect([binOf(edges, -4), binOf(edges, 9)]).toEqual([0, 2])
  })
})
