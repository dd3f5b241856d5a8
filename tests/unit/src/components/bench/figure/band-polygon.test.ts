import { describe, expect, it } from 'vitest'
import { bandPolygons } from '@/components/bench/figure/band-polygon'

describe('bandPolygons', () => {
  it('lies 1.96 standard deviations on either side of the curve', () => {
    expect(bandPolygons([0, 1], [10, 20], [1, 0.5])).toEqual([
      [
        [0, 11.96],
        [1, 20.98],
        [1, 19.02],
        [0, 8.04],
      ],
    ])
  })

  it('is interrupted where nothing is known, and draws no stretch of a single point', () => {
    const polygons = bandPolygons([0, 1, 2, 3, 4, 5], [0, 0, 0, 0, 0, 0], [1, 1, NaN, 1, NaN, 1])
    expect(polygons).toHaveLength(1)
    expect(polygons[0].map(([x]) => x)).toEqual([0, 1, 1, 0])
  })
})
