import { describe, expect, it } from 'vitest'
import { mapCells } from '@/components/correlation/figure/map-cells'
import { axisWindow, shareOutside } from '@/components/correlation/figure/map-window'
import { couplingLimit, couplingStep, densityStep, exceedsLimit } from '@/components/figure/ramp-steps'
import { smoothDensity } from '@/components/correlation/figure/smooth-density'

describe('mapCells', () => {
  it('joins neighbours along y that share a colour and leaves out cells without one', () => {
    const steps = [3, 3, null, 3, 5, 5]
    expect(mapCells([0, 1, 2], [0, 10, 20, 30], (index) => steps[index])).toEqual([
      { x: [0, 1], y: [0, 20], step: 3 },
      { x: [1, 2], y: [0, 10], step: 3 },
      { x: [1, 2], y: [10, 30], step: 5 },
    ])
  })
})

describe('axisWindow', () => {
  const edges = Float64Array.from({ length: 21 }, (_, i) => i)

  it('leaves stray samples outside and keeps two bins beyond the rest', () => {
    const masses = new Float64Array(20)
    masses[1] = 0.0001
    masses[8] = 0.4999
    masses[9] = 0.5
    expect(axisWindow(edges, masses)).toEqual([6, 12])
  })

  it('never reaches beyond the grid', () => {
    const masses = new Float64Array(20).fill(0.05)
    expect(axisWindow(edges, masses)).toEqual([0, 20])
  })

  it('counts what it leaves outside', () => {
    const masses = Float64Array.of(0.001, 0.5, 0.499, 0)
    expect(shareOutside([0, 1, 2], [0, 1, 2], masses, [0, 2], [1, 2])).toBeCloseTo(0.5, 12)
    expect(shareOutside([0, 1, 2], [0, 1, 2], masses, [0, 2], [0, 2])).toBe(0)
  })
})

describe('the colour scales', () => {
  it('run from end to end, with zero coupling in the middle', () => {
    expect([densityStep(0, 64), densityStep(1, 64)]).toEqual([0, 63])
    expect([couplingStep(-2, 2, 65), couplingStep(0, 2, 65), couplingStep(2, 2, 65)]).toEqual([0, 32, 64])
  })

  it('give what lies beyond the scale the colour of its end, and say so', () => {
    expect(couplingStep(-9, 3, 65)).toBe(0)
    expect(exceedsLimit([-9, NaN, 1], -3)).toBe(true)
    expect(exceedsLimit([-9, NaN, 1], 3)).toBe(false)
  })

  it('span at least 2 kT, the data rounded outward, and at most 3 kT', () => {
    expect(couplingLimit([0.3, NaN])).toBe(2)
    expect(couplingLimit([2.1, -0.4])).toBe(3)
    expect(couplingLimit([-4.9])).toBe(3)
  })
})

describe('smoothDensity', () => {
  it('keeps a density flat that is flat per volume, up to the border', () => {
    const volumes = Float64Array.from({ length: 20 }, (_, i) => 1 + (i % 5))
    const smooth = smoothDensity(volumes, volumes, 4, 5, 3)
    for (const value of smooth) expect(value).toBeCloseTo(1, 12)
  })

  it('keeps the sum of the masses', () => {
    const masses = new Float64Array(20)
    masses[7] = 1
    const ones = new Float64Array(20).fill(1)
    const sum = smoothDensity(masses, ones, 4, 5, 2).reduce((total, value) => total + value, 0)
    expect(sum).toBeCloseTo(1, 12)
  })
})
