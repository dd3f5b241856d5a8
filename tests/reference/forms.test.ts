import { describe, expect, it } from 'vitest'
import {
  cosinePowersFromSeries,
  cosineSeriesFromPowers,
  fitForm,
  type FormFit,
  type FormName,
  formPotential,
} from '@shared/forms'
import { potentialEnergy, potentialSlope } from '@shared/inversion'
import { edgesOf, exactHistogram, type ExactCase } from '../support/exact-histograms'
import angleCosine from './fixtures/angle-cosine.json'
import angleHarmonic from './fixtures/angle-harmonic.json'
import conversions from './fixtures/dihedral-conversions.json'
import ryckaertBellemans from './fixtures/dihedral-rb.json'
import harmonicBond from './fixtures/harmonic-bond.json'

const DEGREE = Math.PI / 180

interface FormCase extends Omit<ExactCase, 'energy'> {
  readonly form: FormName
  readonly terms: number | null
  readonly truth: readonly number[]
}

/** Analytic: exact bin probabilities of each form, computed at high precision outside; see the fixtures' own sources. */
const CASES: readonly FormCase[] = [
  {
    form: 'harmonic',
    terms: null,
    kind: 'bond',
    temperature: harmonicBond.inputs.T,
    kT: harmonicBond.inputs.kT,
    edges: edgesOf(harmonicBond.inputs.r_lo, harmonicBond.inputs.r_hi, harmonicBond.inputs.n_bins),
    probabilities: harmonicBond.expected.bin_probability,
    truth: [harmonicBond.inputs.k, harmonicBond.inputs.r0],
  },
  {
    form: 'harmonic',
    terms: null,
    kind: 'angle',
    temperature: angleHarmonic.inputs.T,
    kT: angleHarmonic.inputs.kT,
    edges: edgesOf(0, Math.PI, angleHarmonic.inputs.n_bins),
    probabilities: angleHarmonic.expected.bin_probability,
    truth: [angleHarmonic.inputs.k, angleHarmonic.inputs.theta0_deg * DEGREE],
  },
  {
    form: 'cosine-harmonic',
    terms: null,
    kind: 'angle',
    temperature: angleCosine.inputs.T,
    kT: angleCosine.inputs.kT,
    edges: edgesOf(0, Math.PI, angleCosine.inputs.n_bins),
    probabilities: angleCosine.expected.bin_probability,
    truth: [angleCosine.inputs.k, angleCosine.inputs.theta0_deg * DEGREE],
  },
  {
    // Ryckaert & Bellemans, Chem. Phys. Lett. 30 (1975) 123; its least value is 0, so that C0 is fixed as well.
    form: 'cosine-powers',
    terms: 5,
    kind: 'dihedral',
    temperature: ryckaertBellemans.inputs.T,
    kT: ryckaertBellemans.inputs.kT,
    edges: edgesOf(-Math.PI, Math.PI, ryckaertBellemans.inputs.n_bins),
    probabilities: ryckaertBellemans.expected.bin_probability,
    truth: ryckaertBellemans.inputs.C_kJ_per_mol,
  },
]

function fitted(exact: FormCase): FormFit {
  const histogram = exactHistogram({ ...exact, energy: () => 0 })
  const fit = fitForm(histogram, exact.temperature, exact.form, { terms: exact.terms })
  if (fit.outcome === 'refused') throw new Error(`${fit.form} was refused: ${fit.message}`)
  return fit
}

describe('a form fitted to exact bin probabilities', () => {
  it.each(CASES)('has the parameters they were made from: $form of a $kind', (exact) => {
    fitted(exact).parameters.forEach(({ value }, index) => {
      // Twelve digits of the probabilities leave about 1e-9; the fifth power of a cosine magnifies that tenfold.
      expect(Math.abs(value / exact.truth[index] - 1)).toBeLessThan(1e-8)
    })
  })

  it.each(CASES)('misses no bin by more than rounding: $form of a $kind', (exact) => {
    const { goodness } = fitted(exact)
    expect(goodness?.chiSquare).toBeLessThan(1e-6)
  })

  it('becomes the published torsion, energies and forces', () => {
    const potential = formPotential(fitted(CASES[3]))
    ryckaertBellemans.expected.critical_points_psi_0_to_180.forEach(({ psi_deg, U }) => {
      const phi = (psi_deg - 180) * DEGREE
      expect(Math.abs(potentialEnergy(potential, phi) - U)).toBeLessThan(1e-5)
      // The places are rounded to 1e-10°, and the spline's slope is good to its third order.
      expect(Math.abs(potentialSlope(potential, phi))).toBeLessThan(1e-4)
    })
    conversions.expected.examples[0].U_checks.forEach(({ phi_deg, U, minus_dU_dphi_per_rad }) => {
      expect(Math.abs(potentialEnergy(potential, phi_deg * DEGREE) - U)).toBeLessThan(1e-5)
      expect(Math.abs(potentialSlope(potential, phi_deg * DEGREE) + minus_dU_dphi_per_rad)).toBeLessThan(1e-4)
    })
  })
})

/** V0 + Σ V_n/2 (1 ± cos nφ), + for odd n, as a_0 … a_N. */
function seriesFromHalves([constant, ...halves]: readonly number[]): number[] {
  const sum = halves.reduce((all, half) => all + half / 2, constant)
  return [sum, ...halves.map((half, index) => (index % 2 === 0 ? half / 2 : -half / 2))]
}

/** Formulas and examples of the fixture; Ryckaert & Bellemans (1975) among them. */
describe('conversions of dihedral coefficients', () => {
  const { rel, abs } = conversions.tolerance
  const isClose = (value: number, expected: number) => {
    expect(Math.abs(value - expected)).toBeLessThanOrEqual(abs + rel * Math.abs(expected))
  }

  it.each(conversions.expected.examples)('$direction: $note', (example) => {
    if (example.input_C0_to_C5 !== undefined && example.output_V0_to_V5 !== undefined) {
      const series = seriesFromHalves(example.output_V0_to_V5)
      cosineSeriesFromPowers(example.input_C0_to_C5).forEach((value, n) => isClose(value, series[n]))
      cosinePowersFromSeries(series).forEach((value, n) => isClose(value, example.input_C0_to_C5[n]))
    } else {
      const series = seriesFromHalves([0, ...(example.input_V1_to_V4 ?? [])])
      const powers = (example.output_C0_to_C5 ?? []).slice(0, series.length)
      expect(powers).toHaveLength(5)
      cosinePowersFromSeries(series).forEach((value, n) => isClose(value, powers[n]))
      cosineSeriesFromPowers(powers).forEach((value, n) => isClose(value, series[n]))
    }
  })

  it.each(conversions.expected.examples)('keep the energy at every place: $note', (example) => {
    const powers = example.input_C0_to_C5 ?? example.output_C0_to_C5 ?? []
    const series = cosineSeriesFromPowers(powers)
    example.U_checks.forEach(({ phi_deg, U }) => {
      isClose(
        series.reduce((sum, a, n) => sum + a * Math.cos(n * phi_deg * DEGREE), 0),
        U,
      )
    })
  })
})
