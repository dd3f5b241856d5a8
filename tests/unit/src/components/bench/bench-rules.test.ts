import { describe, expect, it } from 'vitest'
import { nudgedSmoothing, SMOOTHING_RANGE, withinRange } from '@/components/bench/smoothing-range'
import { warningPlaces } from '@/components/bench/warning-titles'

describe('nudgedSmoothing', () => {
  it('takes over by hand from where automatic smoothing sits, a tenth at a time', () => {
    expect(nudgedSmoothing({ mode: 'auto', criterion: 'likelihood' }, 2.85, 1)).toEqual({
      mode: 'manual',
      log10Lambda: 2.95,
    })
    expect(nudgedSmoothing({ mode: 'manual', log10Lambda: 4 }, 2.85, -1)).toEqual({
      mode: 'manual',
      log10Lambda: 3.9,
    })
  })

  it('stops at the ends of the slider', () => {
    const { high, low } = SMOOTHING_RANGE
    expect(nudgedSmoothing({ mode: 'manual', log10Lambda: high }, 0, 1)).toMatchObject({ log10Lambda: high })
    expect(withinRange(-50)).toBe(low)
  })
})

describe('warningPlaces', () => {
  const edges = [0, 1, 2, 3]

  it('points at the straight angle', () => {
    expect(warningPlaces([{ code: 'SLOPE_AT_STRAIGHT_ANGLE' }], edges, [0, 1, 0])).toEqual([Math.PI])
  })

  it('points at the ends of the histogram that hold counts', () => {
    expect(warningPlaces([{ code: 'DATA_AT_EDGE' }], edges, [0, 1, 4])).toEqual([3])
    expect(warningPlaces([{ code: 'DATA_AT_EDGE' }], edges, [2, 1, 4])).toEqual([0, 3])
  })

  it('points nowhere for a doubt that has no place', () => {
    expect(warningPlaces([{ code: 'FEW_SAMPLES' }], edges, [2, 1, 4])).toEqual([])
  })
})
