import { describe, expect, it } from 'vitest'
import { contourLines } from '@/components/correlation/figure/contour-lines'

const axis = Float64Array.from({ length: 41 }, (_, i) => -2 + i * 0.1)
const grid = (f: (x: number, y: number) => number) =>
  Float64Array.from({ length: 41 * 41 }, (_, index) => f(axis[Math.floor(index / 41)], axis[index % 41]))

describe('contourLines', () => {
  it('draws one closed circle for a paraboloid, on its radius', () => {
    const lines = contourLines(
      axis,
      axis,
      grid((x, y) => x * x + y * y),
      1,
    )
    expect(lines).toHaveLength(1)
    expect(lines[0][0]).toEqual(lines[0][lines[0].length - 1])
    for (const [x, y] of lines[0]) {
      // Linear interpolation of a parabola over 0.1 misses by at most h²/8 = 0.00125 in value, half of that in radius.
      expect(Math.hypot(x, y)).toBeCloseTo(1, 2)
    }
  })

  it('draws two circles for two wells, and none below the lowest value', () => {
    const wells = grid((x, y) => Math.min((x - 1) ** 2, (x + 1) ** 2) + y * y)
    expect(contourLines(axis, axis, wells, 0.25)).toHaveLength(2)
    expect(contourLines(axis, axis, wells, -1)).toEqual([])
  })

  it('ends a line that runs out of the grid at the border', () => {
    const [line, ...others] = contourLines(
      axis,
      axis,
      grid((x) => x),
      0.05,
    )
    expect(others).toEqual([])
    expect(line.map(([x]) => x).every((x) => Math.abs(x - 0.05) < 1e-9)).toBe(true)
    expect([line[0][1], line[line.length - 1][1]].toSorted((a, b) => a - b)).toEqual([-2, 2])
  })

  it('takes infinity, where nothing was counted, as above every level', () => {
    const lines = contourLines(
      axis,
      axis,
      grid((x, y) => (Math.hypot(x, y) < 0.5 ? 0 : Infinity)),
      1,
    )
    expect(lines).toHaveLength(1)
    for (const point of lines[0]) expect(point.every(Number.isFinite)).toBe(true)
  })

  it('parts a saddle by the mean of its corners', () => {
    const corners = Float64Array.of(0, 2, 2, 0)
    const ends = Float64Array.of(0, 1)
    // Low corners at (0, 0) and (1, 1), mean 1: below the level 1.5 they are joined, above 0.5 they are parted.
    for (const level of [0.5, 1.5]) {
      const lines = contourLines(ends, ends, corners, level)
      expect(lines).toHaveLength(2)
      const nearLowCorner = lines.some((line) => line.every(([x, y]) => x + y < 1))
      expect(nearLowCorner).toBe(level === 0.5)
    }
  })
})
