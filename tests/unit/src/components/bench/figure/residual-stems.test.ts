import { describe, expect, it } from 'vitest'
import { residualStems, stemPath } from '@/components/bench/figure/residual-stems'
import { linearScale } from '@/components/figure/linear-scale'

const x = linearScale([0, 10], [100, 200])
const y = linearScale([-4, 4], [80, 0])

describe('residualStems', () => {
  it('stands on the zero line at the middle of each bin, upward where more was counted', () => {
    expect(residualStems([2, 5], [1, -2], x, y)).toEqual([
      { at: 120, from: 40, to: 30, beyond: false },
      { at: 150, from: 40, to: 60, beyond: false },
    ])
  })

  it('ends at the edge of the strip and says so where a residual reaches further', () => {
    expect(residualStems([5], [9], x, y)).toEqual([{ at: 150, from: 40, to: 0, beyond: true }])
  })

  it('leaves out bins outside the shown range and those nothing is expected in', () => {
    expect(residualStems([-1, 5, 11], [1, NaN, 1], x, y)).toEqual([])
  })
})

describe('stemPath', () => {
  it('draws a line for each stem and an arrow head on those that are cut', () => {
    expect(stemPath(residualStems([2], [1], x, y))).toBe('M120 40V30')
    expect(stemPath(residualStems([5], [9], x, y))).toBe('M150 40V0M147 3L150 0L153 3')
    expect(stemPath(residualStems([5], [-9], x, y))).toBe('M150 40V80M147 77L150 80L153 77')
  })
})
