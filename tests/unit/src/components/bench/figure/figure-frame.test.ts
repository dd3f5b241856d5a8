import { describe, expect, it } from 'vitest'
import { figureFrame, RESIDUAL_HEIGHT, SPINE_HEIGHT } from '@/components/bench/figure/figure-frame'

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

  it('puts the residual between distribution and spine, at the cost of both panels', () => {
    const [plain, frame] = [figureFrame(652, 526), figureFrame(652, 526, true)]
    const strip = frame.residual!
    expect(plain.residual).toBeNull()
    expect(strip.height).toBe(RESIDUAL_HEIGHT)
    expect(strip.top + strip.height).toBe(frame.spineTop)
    expect(strip.top).toBeGreaterThan(frame.distribution.top + frame.distribution.height)
    expect(frame.potential.top + frame.potential.height).toBe(plain.potential.top + plain.potential.height)
    expect(frame.distribution.height).toBeLessThan(plain.distribution.height)
    expect(frame.potential.height).toBeLessThan(plain.potential.height)
  })

  it('gives a narrow figure smaller margins', () => {
    expect(figureFrame(358, 392).narrow).toBe(true)
    expect(figureFrame(358, 392).distribution.width).toBe(282)
    expect(figureFrame(652, 526).distribution.width).toBe(540)
  })
})
