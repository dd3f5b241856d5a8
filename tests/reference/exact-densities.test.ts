import { describe, expect, it } from 'vitest'
import { binCentroids, binVolumes, createHistogram } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert } from '@shared/inversion'
import { edgesOf, exactHistogram, type ExactCase, largestError, ragged } from '../support/exact-histograms'
import angleCosine from './fixtures/angle-cosine.json'
import angleHarmonic from './fixtures/angle-harmonic.json'
import angleIdeal from './fixtures/angle-ideal.json'
import harmonicBond from './fixtures/harmonic-bond.json'
import iterativeUpdate from './fixtures/iterative-update.json'
import ryckaertBellemans from './fixtures/dihedral-rb.json'
import vonMises from './fixtures/dihedral-vonmises.json'

const DEGREE = Math.PI / 180

/** Analytic: r² exp(−U/kT), U = (k/2)(r − r₀)². */
const bond: ExactCase = {
  kind: 'bond',
  temperature: harmonicBond.inputs.T,
  kT: harmonicBond.inputs.kT,
  edges: edgesOf(harmonicBond.inputs.r_lo, harmonicBond.inputs.r_hi, harmonicBond.inputs.n_bins),
  probabilities: harmonicBond.expected.bin_probability,
  energy: (r) => (harmonicBond.inputs.k / 2) * (r - harmonicBond.inputs.r0) ** 2,
}
/** Analytic: sin θ exp(−U/kT), U = (k/2)(θ − θ₀)², straight angles included. */
const angle: ExactCase = {
  kind: 'angle',
  temperature: angleHarmonic.inputs.T,
  kT: angleHarmonic.inputs.kT,
  edges: edgesOf(0, Math.PI, angleHarmonic.inputs.n_bins),
  probabilities: angleHarmonic.expected.bin_probability,
  energy: (theta) => (angleHarmonic.inputs.k / 2) * (theta - angleHarmonic.inputs.theta0_deg * DEGREE) ** 2,
}
/** Analytic: U = (k/2)(cos θ − cos θ₀)². */
const cosineAngle: ExactCase = {
  kind: 'angle',
  temperature: angleCosine.inputs.T,
  kT: angleCosine.inputs.kT,
  edges: edgesOf(0, Math.PI, angleCosine.inputs.n_bins),
  probabilities: angleCosine.expected.bin_probability,
  energy: (theta) =>
    (angleCosine.inputs.k / 2) * (Math.cos(theta) - Math.cos(angleCosine.inputs.theta0_deg * DEGREE)) ** 2,
}
/** Ryckaert & Bellemans, Chem. Phys. Lett. 30 (1975) 123: cosine powers of φ − 180°. */
const cosinePowers: ExactCase = {
  kind: 'dihedral',
  temperature: ryckaertBellemans.inputs.T,
  kT: ryckaertBellemans.inputs.kT,
  edges: edgesOf(-Math.PI, Math.PI, ryckaertBellemans.inputs.n_bins),
  probabilities: ryckaertBellemans.expected.bin_probability,
  energy: (phi) =>
    ryckaertBellemans.inputs.C_kJ_per_mol.reduce(
      (sum, coefficient, power) => sum + coefficient * Math.cos(phi - Math.PI) ** power,
      0,
    ),
}
/** Analytic: von Mises, U = −κ kT cos(φ − μ). */
const cosineWell: ExactCase = {
  kind: 'dihedral',
  temperature: vonMises.inputs.T,
  kT: vonMises.inputs.kT,
  edges: edgesOf(-Math.PI, Math.PI, vonMises.inputs.n_bins),
  probabilities: vonMises.expected.bin_probability,
  energy: (phi) =>
    -vonMises.inputs.kappa * vonMises.inputs.kT * Math.cos(phi - vonMises.inputs.mu_deg * DEGREE),
}

describe('the automatic inversion of exact bin probabilities', () => {
  it.each([
    ['a harmonic bond', bond],
    ['a harmonic angle near 180°', angle],
    ['a cosine-harmonic angle', cosineAngle],
    ['a dihedral in cosine powers', cosinePowers],
    ['a dihedral in one cosine', cosineWell],
  ])('is within 0.01 kT of the true potential wherever that is below 6 kT: %s', (_, exact) => {
    expect(largestError(exact)).toBeLessThan(0.01)
    // Bins of one and two widths in turns.
    expect(largestError(ragged(exact, [1, 2, 1, 1]))).toBeLessThan(0.01)
  })

  it('is flat for freely jointed angles', () => {
    const ideal: ExactCase = {
      kind: 'angle',
      temperature: angleIdeal.inputs.T,
      kT: angleIdeal.inputs.kT,
      edges: edgesOf(0, Math.PI, angleIdeal.inputs.n_bins),
      probabilities: angleIdeal.expected.bin_probability,
      energy: () => 0,
    }
    expect(largestError(ideal)).toBeLessThan(1e-5)
    const { bins } = invert(exactHistogram(ideal), ideal.temperature, DEFAULT_INVERSION_SETTINGS)
    expect(Math.max(...bins.rawEnergies)).toBeLessThan(1e-8)
  })
})

describe('bins of the reference files', () => {
  it.each([
    ['bond', bond, harmonicBond.expected.bin_volume_nm3, harmonicBond.expected.bin_centroid_J_weighted],
    ['angle', angle, angleHarmonic.expected.bin_volume, angleHarmonic.expected.bin_centroid_J_weighted_rad],
  ] as const)('%s volumes and Jacobian-weighted centroids', (_, exact, volumes, centroids) => {
    const edges = Float64Array.from(exact.edges)
    binVolumes(exact.kind, edges).forEach((volume, bin) => {
      expect(Math.abs(volume / volumes[bin] - 1)).toBeLessThan(1e-10)
    })
    binCentroids(exact.kind, edges).forEach((centroid, bin) => {
      expect(Math.abs(centroid - centroids[bin])).toBeLessThan(1e-10)
    })
  })

  it.each([
    ['harmonic bond', bond, harmonicBond.expected.U_inverted_absolute],
    ['harmonic angle', angle, angleHarmonic.expected.U_inverted_absolute],
    ['cosine-harmonic angle', cosineAngle, angleCosine.expected.U_inverted_absolute],
    ['cosine powers', cosinePowers, ryckaertBellemans.expected.U_inverted_absolute_at_bin_midpoint],
    ['one cosine', cosineWell, vonMises.expected.U_inverted_minus_kT_ln_p_over_width],
  ])('unsmoothed inversion of the %s, bin by bin', (_, exact, energies) => {
    const { bins } = invert(exactHistogram(exact), exact.temperature, DEFAULT_INVERSION_SETTINGS)
    const least = Math.min(...energies)
    // The fixture rounds probabilities to twelve digits: 1e-8 kJ/mol.
    bins.rawEnergies.forEach((energy, bin) => {
      expect(Math.abs(energy - (energies[bin] - least))).toBeLessThan(1e-8)
    })
  })
})

/**
 * Sampling −kT ln p, which leaves the Jacobian out, gives the volumes once more; one update U + kT ln(P/P_target) then repairs
 * exactly that (Soper, Chem. Phys. 202 (1996) 295; Reith, Pütz, Müller-Plathe, J. Comput. Chem. 24 (2003) 1624).
 */
describe('an inversion without the Jacobian', () => {
  const { inputs, expected, tolerance } = iterativeUpdate
  const target = expected.angle_target_bin_probability
  const edges = edgesOf(0, Math.PI, inputs.angle.n_bins)
  const histogram = createHistogram({ kind: 'angle', edges, weights: target, content: 'probability' })
  const { bins, uncorrectedEnergies } = invert(histogram, inputs.angle.T, DEFAULT_INVERSION_SETTINGS)
  const { kT } = inputs.angle

  it('is sampled with the volumes twice', () => {
    const masses = uncorrectedEnergies.map((energy, bin) => bins.volumes[bin] * Math.exp(-energy / kT))
    const total = masses.reduce((sum, mass) => sum + mass, 0)
    expected.angle_sampled_bin_probability_before.forEach((probability, bin) => {
      // The fixture rounds target and result to twelve digits each.
      expect(Math.abs(masses[bin] / total / probability - 1)).toBeLessThan(tolerance.rel)
    })
  })

  it('becomes the inversion with the Jacobian after one update', () => {
    expected.angle_U2_minus_its_minimum.forEach((energy, bin) => {
      expect(Math.abs(bins.rawEnergies[bin] - energy)).toBeLessThan(1e-8)
    })
  })
})
