import { describe, expect, it } from 'vitest'
import { createRandom } from '@shared/numeric/random'
import { createBoltzmannSampler } from '../../../../server/demo/boltzmann-sampler'
import type { CoordinatePotential } from '../../../../server/demo/chain-potentials'

const free = (kind: CoordinatePotential['kind'], low: number, high: number): CoordinatePotential => ({
  kind,
  low,
  high,
  energy: () => 0,
})

describe('createBoltzmannSampler', () => {
  it('weighs a bond by r² and an angle by sin θ, exactly where no potential acts', () => {
    // Midpoint rule on 4096 cells: relative error (π/4096)²/24, about 2e-8.
    expect(createBoltzmannSampler(free('bond', 0, 1), 3).partition).toBeCloseTo(1 / 3, 7)
    expect(createBoltzmannSampler(free('angle', 0, Math.PI), 3).partition).toBeCloseTo(2, 6)
    expect(createBoltzmannSampler(free('dihedral', -Math.PI, Math.PI), 3).partition).toBeCloseTo(
      2 * Math.PI,
      9,
    )
  })

  it('draws cos θ evenly for a free angle', () => {
    const sampler = createBoltzmannSampler(free('angle', 0, Math.PI), 3)
    const random = createRandom(11)
    const bins = new Float64Array(20)
    const draws = 40_000
    for (let i = 0; i < draws; i++) bins[Math.floor((Math.cos(sampler.draw(random)) + 1) * 10)]++
    const chiSquare = bins.reduce((sum, n) => sum + (n - draws / 20) ** 2 / (draws / 20), 0)
    // 99.9th percentile of χ² with 19 degrees of freedom
    expect(chiSquare).toBeLessThan(43.8)
  })

  it('gives a density that integrates to 1', () => {
    const sampler = createBoltzmannSampler(
      { kind: 'bond', low: 0.2, high: 0.4, energy: (r) => 4000 * (r - 0.3) ** 2 },
      3.3,
    )
    let sum = 0
    for (let i = 0; i < 2000; i++) sum += sampler.density(0.2 + (i + 0.5) * 1e-4) * 1e-4
    expect(sum).toBeCloseTo(1, 5)
  })
})
