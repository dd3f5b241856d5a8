import { describe, expect, it } from 'vitest'
import {
  binnedFlatDivergence,
  curveFlatDivergence,
  dihedralFlatness,
  flatDivergenceByChance,
} from '@shared/flatness'
import { DEFAULT_INVERSION_SETTINGS, invert } from '@shared/inversion'
import { GAUSS_LEGENDRE } from '@shared/numeric'
import { edgesOf, exactHistogram } from '../support/exact-histograms'
import flatness from './fixtures/dihedral-flatness.json'
import ryckaertBellemans from './fixtures/dihedral-rb.json'
import vonMises from './fixtures/dihedral-vonmises.json'

/*
 * Source: fixtures/dihedral-flatness.json; KL(p‖uniform) = z I₁(z)/I₀(z) − ln I₀(z), z = a/(2 kT), is analytic (Kullback &
 * Leibler 1951; citation from memory). The tolerance is the fixture's own: twelve printed digits.
 */
const { rel } = flatness.tolerance
const { multiplicity_n: n } = flatness.inputs
const { rows, multinomial_null_mean_of_plugin_KL: byChance } = flatness.expected
const torsion = (amplitude: number) => (angle: number) => (amplitude / 2) * (1 + Math.cos(n * angle))

/** Exact masses of equal bins of exp(−u), each bin cut in eight panels of five points. */
function masses(energy: (angle: number) => number, bins: number): Float64Array {
  const [width, cuts] = [(2 * Math.PI) / bins, 8]
  return Float64Array.from({ length: bins }, (_, bin) => {
    let sum = 0
    for (let cut = 0; cut < cuts; cut++) {
      const middle = -Math.PI + (bin + (cut + 0.5) / cuts) * width
      for (const { node, weight } of GAUSS_LEGENDRE)
        sum += weight * Math.exp(-energy(middle + (node * width) / cuts / 2))
    }
    return sum
  })
}
const relative = (value: number, expected: number) => Math.abs(value / expected - 1)

describe('divergence from the flat distribution', () => {
  it.each(rows)('of U = (a/2)(1 + cos 3φ) with a = $a_over_kT kT, continuous and binned', (row) => {
    const energy = torsion(row.a_over_kT)
    expect(relative(curveFlatDivergence(energy), row.KL_continuous_nats)).toBeLessThan(rel)
    for (const [bins, expected] of Object.entries(row.KL_binned_nats_by_n_bins)) {
      const edges = Float64Array.from(edgesOf(-Math.PI, Math.PI, Number(bins)))
      expect(relative(binnedFlatDivergence(masses(energy, Number(bins)), edges), expected)).toBeLessThan(rel)
    }
  })

  it.each(byChance.examples)('by chance, for $K bins and $N samples', ({ K, N, mean }) => {
    expect(relative(flatDivergenceByChance(K, N), mean)).toBeLessThan(rel)
  })

  it('of a dihedral in cosine powers and of one in one cosine', () => {
    const { C_kJ_per_mol, kT, n_bins } = ryckaertBellemans.inputs
    const powers = (phi: number) =>
      C_kJ_per_mol.reduce((sum, c, power) => sum + (c / kT) * Math.cos(phi - Math.PI) ** power, 0)
    const edges = Float64Array.from(edgesOf(-Math.PI, Math.PI, n_bins))
    const { expected: butane } = ryckaertBellemans
    expect(relative(curveFlatDivergence(powers), butane.KL_from_uniform_nats_continuous)).toBeLessThan(rel)
    const binned = binnedFlatDivergence(Float64Array.from(butane.bin_probability), edges)
    expect(relative(binned, butane.KL_from_uniform_nats_binned)).toBeLessThan(rel)
    const { kappa, mu_deg } = vonMises.inputs
    const wave = curveFlatDivergence((phi) => -kappa * Math.cos(phi - (mu_deg * Math.PI) / 180))
    expect(relative(wave, vonMises.expected.KL_from_uniform_nats_continuous)).toBeLessThan(
      vonMises.tolerance.rel,
    )
    const ofBins = binnedFlatDivergence(Float64Array.from(vonMises.expected.bin_probability), edges)
    expect(relative(ofBins, vonMises.expected.KL_from_uniform_nats_binned)).toBeLessThan(
      vonMises.tolerance.rel,
    )
  })
})

describe('the inversion of exact weak torsions', () => {
  it.each(rows)('has amplitude a = $a_over_kT kT and its divergence, and the verdict that follows', (row) => {
    const probabilities = [...masses(torsion(row.a_over_kT), 72)]
    const total = probabilities.reduce((sum, mass) => sum + mass, 0)
    const exact = {
      kind: 'dihedral' as const,
      temperature: 300,
      kT: 1,
      edges: edgesOf(-Math.PI, Math.PI, 72),
      probabilities: probabilities.map((mass) => mass / total),
      energy: () => 0,
    }
    const judged = dihedralFlatness(invert(exactHistogram(exact), 300, DEFAULT_INVERSION_SETTINGS))
    // The inversion of exact bins is held to 0.01 kT elsewhere.
    expect(Math.abs(judged.amplitude - row.potential_range_kT)).toBeLessThan(0.01)
    expect(Math.abs(judged.divergence - row.KL_continuous_nats)).toBeLessThan(
      0.01 * Math.sqrt(row.KL_continuous_nats),
    )
    // The second torsion stands on the threshold itself: nobody could tell.
    expect(judged.verdict).toBe({ 0.1: 'flat', 0.5: 'undecided', 1: 'keep', 2: 'keep' }[row.a_over_kT])
  })
})
