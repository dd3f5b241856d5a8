import { describe, expect, it } from 'vitest'
import { identityBasis, penalisedFit, penalisedSystem } from '@shared/smoothing'
import fixture from './fixtures/poisson-smoothing.json'

interface Case {
  readonly label: string
  readonly counts: readonly number[]
  readonly bin_volume: readonly number[]
  readonly periodic: boolean
  readonly difference_order: number
  readonly results: readonly {
    readonly lambda: number
    readonly eta: readonly number[]
    readonly effective_dimension: number
    readonly deviance: number
    readonly posterior_cov_diag: readonly number[]
  }[]
}

/** Newton's method at 40 digits on the same model (Eilers & Marx, Stat. Sci. 11 (1996) 89); tolerance of the fixture. */
describe.each(fixture.expected.cases as readonly Case[])('penalised Poisson smoothing, $label', (given) => {
  const bins = given.counts.length
  const midpoints = Float64Array.from({ length: bins }, (_, bin) => bin + 0.5)
  const system = penalisedSystem(identityBasis(midpoints, given.periodic ? bins : null))
  const counts = Float64Array.from(given.counts)
  const offsets = Float64Array.from(given.bin_volume, Math.log)

  it.each(given.results)(
    'λ = $lambda gives the same curve, dimension, deviance and variances',
    (expected) => {
      const fit = penalisedFit(system, counts, offsets, expected.lambda, null)
      fit.eta.forEach((value, bin) => {
        expect(Math.abs(value - expected.eta[bin])).toBeLessThan(fixture.tolerance.abs_eta)
      })
      const near = (value: number, reference: number) =>
        expect(Math.abs(value / reference - 1)).toBeLessThan(fixture.tolerance.rel_others)
      near(fit.effectiveDimension, expected.effective_dimension)
      near(fit.deviance, expected.deviance)
      fit.variances.forEach((variance, bin) => near(variance, expected.posterior_cov_diag[bin]))
    },
  )
})
