import { describe, expect, it } from 'vitest'
import { figureFrame, SPINE_HEIGHT } from '@/components/bench/figure/figure-frame'

describe('figureFrame', () => {
  it.each([
    [652, 526],
    [358, 392],
    [1000, 760],
  ])('keeps a spine of 38 px between the panels and everything inside %i × %i', (width, height) => {
    const frame = figureFrame(width, height)
    const { distribution, potential } = frame
    expect(SPINE_HEIGHT).toBe(38)
    expect(frame.spineTop).toBe(distribution.top + distribution.height)
    expect(potential.top - frame.spineTop).toBe(38)
    expect([potential.left, potential.width]).toEqual([distribution.left, distribution.width])
    expect(potential.top + potential.height).toBeLessThanOrEqual(height)
    expect(distribution.left + distribution.width).toBeLessThanOrEqual(width)
    expect(potential.height).toBeGreaterThan(distribution.height)
  })

  it('gives a narrow figure smaller margins', () => {
    expect(figureFrame(358, 392).narrow).toBe(true)
    expect(figureFrame(358, 392).distribution.width).toBe(282)
    expect(figureFrame(652, 526).distribution.width).toBe(540)
  })
})
