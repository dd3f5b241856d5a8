import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { linearScale } from '@/components/figure/linear-scale'

describe('linearScale', () => {
  it('takes the ends of the domain to the ends of the range, also when the range runs backwards', () => {
    const scale = linearScale([0, 30], [498, 232])
    expect(scale.at(0)).toBe(498)
    expect(scale.at(30)).toBe(232)
  })

  it('is undone by invert', () => {
    const scale = linearScale([60, 180], [56, 596])
    fc.assert(
      fc.property(fc.double({ min: -500, max: 500, noNaN: true }), (value) => {
        expect(scale.invert(scale.at(value))).toBeCloseTo(value, 9)
      }),
    )
  })
})
