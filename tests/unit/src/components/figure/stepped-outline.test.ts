import { describe, expect, it } from 'vitest'
import { steppedOutline } from '@/components/figure/stepped-outline'

describe('steppedOutline', () => {
  it('goes up at the first edge, over every bin, and down at the last edge', () => {
    expect(steppedOutline([0, 2, 4, 6], [1, 0, 3])).toEqual([
      [0, 0],
      [0, 1],
      [2, 1],
      [2, 0],
      [4, 0],
      [4, 3],
      [6, 3],
      [6, 0],
    ])
  })

  it('encloses the area of the histogram', () => {
    const outline = steppedOutline([0, 1, 3, 3.5], [2, 0.5, 4])
    const doubled = outline.reduce((sum, [x, y], index) => {
      const [nextX, nextY] = outline[(index + 1) % outline.length]
      return sum + nextX * y - x * nextY
    }, 0)
    expect(doubled / 2).toBeCloseTo(2 + 1 + 2, 12)
  })
})
