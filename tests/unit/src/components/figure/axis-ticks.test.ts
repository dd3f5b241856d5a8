import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { axisTicks, stepDecimals, tickStep } from '@/components/figure/axis-ticks'

describe('axisTicks', () => {
  it('labels a full turn in degrees every 60 with a minor tick between', () => {
    const { major, minor } = axisTicks(-180, 180, 7, true)
    expect(major).toEqual([-180, -120, -60, 0, 60, 120, 180])
    expect(minor).toEqual([-150, -90, -30, 30, 90, 150])
  })

  it('labels the picture’s angle axis every 20 degrees from 60 to 180', () => {
    const { major, minor } = axisTicks(60, 180, 7, true)
    expect(major).toEqual([60, 80, 100, 120, 140, 160, 180])
    expect(minor).toEqual([70, 90, 110, 130, 150, 170])
  })

  it('counts lengths in 1, 2 and 5 without rounding errors that add up', () => {
    expect(axisTicks(0.2, 0.6, 5).major).toEqual([0.2, 0.30000000000000004, 0.4, 0.5, 0.6000000000000001])
    expect(axisTicks(0.2, 0.6, 5).decimals).toBe(1)
  })

  it('never writes a negative zero', () => {
    expect(axisTicks(-1, 1, 3).major.some((value) => Object.is(value, -0))).toBe(false)
  })

  it('stays within the axis, in order, and labels no more than asked and one', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1000, max: 1000, noNaN: true }),
        fc.double({ min: 1e-3, max: 5000, noNaN: true }),
        fc.integer({ min: 2, max: 12 }),
        fc.boolean(),
        (low, extent, most, degrees) => {
          const high = low + extent
          const { major, minor } = axisTicks(low, high, most, degrees)
          const slack = 1e-6 * extent
          for (const value of [...major, ...minor]) {
            expect(value).toBeGreaterThanOrEqual(low - slack)
            expect(value).toBeLessThanOrEqual(high + slack)
          }
          expect([...major].sort((one, other) => one - other)).toEqual(major)
          expect(major.length).toBeLessThanOrEqual(most + 1)
          expect(minor.filter((value) => major.includes(value))).toEqual([])
        },
      ),
    )
  })
})

describe('tickStep', () => {
  it('takes steps that divide the turn for degrees only', () => {
    expect(tickStep(0, 180, 6, true)).toEqual([30, 10])
    expect(tickStep(0, 180, 6)).toEqual([50, 10])
  })
})

describe('stepDecimals', () => {
  it('gives the decimals that tell neighbours apart', () => {
    expect([20, 1, 0.5, 0.02, 0.001].map(stepDecimals)).toEqual([0, 0, 1, 2, 3])
  })
})
