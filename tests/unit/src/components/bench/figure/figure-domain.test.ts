import { describe, expect, it } from 'vitest'
import { densityTop, energyDomain, shownDomain } from '@/components/bench/figure/figure-domain'

const degrees = Array.from({ length: 91 }, (_, edge) => 2 * edge)

describe('shownDomain', () => {
  it('shows a dihedral its full turn, whatever is populated', () => {
    expect(shownDomain('dihedral', [-30, 0, 30], { first: 0, last: 1 }, 'degree')).toEqual([-180, 180])
  })

  it('leaves room beside the populated bins and ends on a minor tick', () => {
    const [low, high] = shownDomain('angle', degrees, { first: 40, last: 69 }, 'degree')
    expect(low).toBe(60)
    expect(high).toBe(160)
  })

  it('never leaves the domain of an angle or a bond', () => {
    expect(shownDomain('angle', degrees, { first: 40, last: 89 }, 'degree')[1]).toBe(180)
    expect(shownDomain('bond', [0.01, 0.2, 0.4], { first: 0, last: 1 }, 'nm')[0]).toBe(0)
  })
})

describe('axis tops', () => {
  it('leave 14 % of the panel above the tallest bin', () => {
    expect(densityTop([1, 2.58])).toBeCloseTo(3, 12)
  })

  it('hold every bin by bin energy, with room below zero for the lowest', () => {
    const [low, high] = energyDomain([-2, 0, 17.2], [])
    expect(high).toBeCloseTo(20, 12)
    expect(low).toBeCloseTo(-2.6, 12)
  })

  it('let the comparison add a third at most, since it has no bound where the Jacobian vanishes', () => {
    expect(energyDomain([0, 9], [0, 1000])[1]).toBeCloseTo(12 / 0.86, 12)
  })
})
