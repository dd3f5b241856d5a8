import { describe, expect, it } from 'vitest'
import { adaptiveDensity } from '@/components/correlation/figure/adaptive-density'

const flat = (value: number) => new Float64Array(81).fill(value)

describe('adaptiveDensity', () => {
  it('leaves cells that hold four independent samples as they were measured', () => {
    const masses = Float64Array.from({ length: 81 }, (_, i) => (1 + (i % 5)) / 1000)
    const volumes = flat(0.5)
    const density = adaptiveDensity(masses, volumes, 9, 9, 10_000)
    masses.forEach((mass, index) => expect(density[index]).toBe(mass / 0.5))
  })

  it('spreads a single count over the neighbours that it takes to hold four', () => {
    const masses = flat(0)
    masses[40] = 1 / 100
    masses[41] = 3 / 100
    const density = adaptiveDensity(masses, flat(1), 9, 9, 100)
    // The square of nine cells around either holds both counts, four samples in all.
    expect(density[40]).toBeCloseTo(0.04 / 9, 12)
    expect(density[32]).toBeCloseTo(0.04 / 9, 12)
  })

  it('weighs by volume: a flat density stays flat where volumes vanish', () => {
    const volumes = Float64Array.from({ length: 81 }, (_, i) => Math.sin((Math.PI * ((i % 9) + 0.5)) / 9))
    const total = volumes.reduce((sum, volume) => sum + volume, 0)
    const masses = volumes.map((volume) => volume / total)
    for (const density of adaptiveDensity(masses, volumes, 9, 9, 50)) {
      expect(density).toBeCloseTo(1 / total, 12)
    }
  })

  it('averages nothing when the number of independent samples is not known', () => {
    const masses = flat(0)
    masses[0] = 1
    const density = adaptiveDensity(masses, flat(2), 9, 9, null)
    expect(density[0]).toBe(0.5)
    expect(density.slice(1).every((value) => value === 0)).toBe(true)
  })
})
