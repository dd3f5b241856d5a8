import { describe, expect, it } from 'vitest'
import { binCentroids, type CoordinateKind, jacobian } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert, type Potential, regenerate } from '@shared/inversion'
import { GAUSS_LEGENDRE } from '@shared/numeric'
import { thermalEnergy } from '@shared/units'
import { edgesOf, type ExactCase, exactHistogram } from '../support/exact-histograms'
import fixture from './fixtures/chain-statistics.json'

/*
 * Source: fixtures/chain-statistics.json, a chain of harmonic bonds and angles with free torsions. Mean square end-to-end
 * distance n⟨l²⟩ + 2⟨l⟩² Σ (n − k) cᵏ with c = −⟨cos θ⟩ (Flory, Statistical Mechanics of Chain Molecules, 1969; from memory
 * there, finite n verified). What is checked is that inverted tables stand for these averages, Jacobian included.
 */
const { T, bond, angle } = fixture.inputs.chain
const expected = fixture.expected.harmonic_bond_harmonic_angle_free_torsion
const kT = thermalEnergy(T)
const theta0 = (angle.theta0_deg * Math.PI) / 180

/** U = ½ k (q − q₀)² as exact probabilities of bins, by Gauss–Legendre in each. */
function harmonic(kind: CoordinateKind, k: number, q0: number, edges: number[]): ExactCase {
  const energy = (q: number) => (k / 2) * (q - q0) ** 2
  const masses = edges.slice(1).map((high, bin) => {
    const half = (high - edges[bin]) / 2
    return GAUSS_LEGENDRE.reduce((sum, { node, weight }) => {
      const q = edges[bin] + half * (1 + node)
      return sum + weight * half * jacobian(kind, q) * Math.exp(-energy(q) / kT)
    }, 0)
  })
  const total = masses.reduce((sum, mass) => sum + mass, 0)
  return { kind, temperature: T, kT, edges, probabilities: masses.map((mass) => mass / total), energy }
}

/** ⟨f⟩ under a potential, on a grid so fine that its bins do not matter. */
function mean(
  potential: Potential,
  [low, high]: readonly [number, number],
  f: (q: number) => number,
): number {
  const edges = Float64Array.from(edgesOf(low, high, 20_000))
  const places = binCentroids(potential.kind, edges)
  return regenerate(potential.kind, potential, edges, true).reduce(
    (sum, mass, bin) => sum + mass * f(places[bin]),
    0,
  )
}

const inverted = (exact: ExactCase) => invert(exactHistogram(exact), T, DEFAULT_INVERSION_SETTINGS).potential
const bondPotential = inverted(harmonic('bond', bond.k, bond.r0, edgesOf(0.2, 0.5, 120)))
const anglePotential = inverted(harmonic('angle', angle.k, theta0, edgesOf(0, Math.PI, 120)))
const length = mean(bondPotential, [0.15, 0.55], (r) => r)
const squaredLength = mean(bondPotential, [0.15, 0.55], (r) => r * r)
const cosine = -mean(anglePotential, [0, Math.PI], Math.cos)

/** What a table leaves of 1e8 counts: a few thousandths of kT far out, a millionth of an average. */
const RELATIVE = 1e-5

describe('the chain that inverted tables stand for', () => {
  it('has the mean bond, mean square bond and mean cosine of the reference', () => {
    expect(Math.abs(length / expected.mean_l - 1)).toBeLessThan(RELATIVE)
    expect(Math.abs(squaredLength / expected.mean_l2 - 1)).toBeLessThan(RELATIVE)
    expect(Math.abs(cosine / expected.c_mean_cos_between_successive_bonds - 1)).toBeLessThan(RELATIVE)
  })

  it.each(Object.entries(expected.R2))(
    'has the mean square end-to-end distance of %s bonds',
    (bonds, squared) => {
      const n = Number(bonds)
      let sum = 0
      for (let k = 1; k < n; k++) sum += (n - k) * cosine ** k
      const distance = n * squaredLength + 2 * length * length * sum
      // Errors of c count with up to 1/(1 − c)² in a long chain.
      expect(Math.abs(distance / squared - 1)).toBeLessThan(10 * RELATIVE)
    },
  )
})
