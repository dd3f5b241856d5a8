import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fitForm, type FormFit, type FormName, parametersInUnits } from '@shared/forms'
import { createHistogram, type Histogram } from '@shared/histogram'
import {
  COSINE_ANGLE,
  HARMONIC_ANGLE,
  HARMONIC_BOND,
  MORSE_BOND,
  QUARTIC_BOND,
  type SampledTerm,
  sampled,
  SKEWED_TURN,
  STRAIGHT_ANGLE,
  TEMPERATURE,
  THREE_COSINES,
  TWO_STATES,
} from './samples'

function fitted(histogram: Histogram, form: FormName, terms: number | null = null): FormFit {
  const fit = fitForm(histogram, TEMPERATURE, form, { terms })
  if (fit.outcome === 'refused') throw new Error(`${form} was refused: ${fit.message}`)
  return fit
}

function refusalOf(histogram: Histogram, form: FormName, terms: number | null = null): string | null {
  const result = fitForm(histogram, TEMPERATURE, form, { terms })
  return result.outcome === 'refused' ? result.code : null
}

const valuesOf = ({ parameters }: FormFit) => parameters.map(({ value }) => value)
const errorsOf = ({ parameters }: FormFit) => parameters.map(({ standardError }) => standardError ?? NaN)

interface Recovery {
  readonly form: FormName
  readonly term: SampledTerm
  readonly terms: number | null
  readonly truth: readonly number[]
}

// C_n of the three cosines by hand: a = 2.5, −1.5, 4; C1 = −a1 + 3 a3, C2 = 2 a2, C3 = −4 a3; C0 from U(least) = 0.
const RECOVERIES: readonly Recovery[] = [
  { form: 'harmonic', term: HARMONIC_BOND, terms: null, truth: [5000, 0.35] },
  { form: 'harmonic', term: HARMONIC_ANGLE, terms: null, truth: [80, 2] },
  { form: 'cosine-harmonic', term: COSINE_ANGLE, terms: null, truth: [50, 2.2] },
  { form: 'quartic', term: QUARTIC_BOND, terms: null, truth: [1200, 0.35, -4000, 60_000] },
  { form: 'morse', term: MORSE_BOND, terms: null, truth: [20, 8, 0.35] },
  { form: 'gaussians', term: TWO_STATES, terms: 2, truth: [0.6, 0.5, 0.03, 0.4, 0.62, 0.02] },
  { form: 'cosine-series', term: THREE_COSINES, terms: 3, truth: [2.5, -1.5, 4] },
  { form: 'cosine-series-phases', term: SKEWED_TURN, terms: 2, truth: [3, 0.7, 2, -1.1] },
]

describe('a fit to exact expected counts', () => {
  it.each(RECOVERIES)(
    'finds the parameters of the true $form of a $term.kind',
    ({ form, term, terms, truth }) => {
      const fit = fitted(sampled(term, 1e8), form, terms)
      // The expected counts come from a midpoint rule on 64 steps a bin, exact to a few parts in 1e6.
      valuesOf(fit).forEach((value, index) => {
        expect(Math.abs(value - truth[index])).toBeLessThan(2e-5 * Math.abs(truth[index]))
      })
    },
  )

  it('tells cosine powers apart from their series by nothing but words', () => {
    const histogram = sampled(THREE_COSINES, 20_000, 5)
    const series = fitted(histogram, 'cosine-series', 3)
    const powers = fitted(histogram, 'cosine-powers', 3)
    const [k1, k2, k3] = valuesOf(series)
    expect(valuesOf(powers)[1]).toBeCloseTo(-k1 + 3 * k3, 8)
    expect(valuesOf(powers)[2]).toBeCloseTo(2 * k2, 8)
    expect(valuesOf(powers)[3]).toBeCloseTo(-4 * k3, 8)
    expect(powers.aic).toBeCloseTo(series.aic ?? NaN, 6)
  })
})

describe('a fit to sampled counts', () => {
  it.each(RECOVERIES)(
    'is within 3 standard errors of the true $form of a $term.kind',
    ({ form, term, terms, truth }) => {
      const fit = fitted(sampled(term, 20_000, 11), form, terms)
      const errors = errorsOf(fit)
      valuesOf(fit).forEach((value, index) => {
        expect(Math.abs(value - truth[index])).toBeLessThan(3 * errors[index])
      })
      expect(fit.goodness).not.toBeNull()
    },
  )

  it.each<[FormName, SampledTerm, number | null, readonly number[]]>([
    ['harmonic', HARMONIC_BOND, null, [5000, 0.35]],
    ['cosine-harmonic', COSINE_ANGLE, null, [50, 2.2]],
    ['cosine-series-phases', SKEWED_TURN, 2, [3, 0.7, 2, -1.1]],
    ['gaussians', TWO_STATES, 2, [0.6, 0.5, 0.03, 0.4, 0.62, 0.02]],
  ])('states the errors that 200 repeats scatter by: %s', (form, term, terms, truth) => {
    const repeats = 200
    const fits = Array.from({ length: repeats }, (_, seed) =>
      fitted(sampled(term, 4000, seed + 1), form, terms),
    )
    truth.forEach((exact, index) => {
      const values = fits.map((fit) => valuesOf(fit)[index])
      const stated = Math.sqrt(fits.reduce((sum, fit) => sum + errorsOf(fit)[index] ** 2, 0) / repeats)
      const mean = values.reduce((sum, value) => sum + value, 0) / repeats
      const scatter = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (repeats - 1))
      // A standard deviation from 200 repeats has a relative error of 5 %: four of them.
      expect(Math.abs(scatter / stated - 1)).toBeLessThan(0.2)
      // The mean has the error stated/√200; a bias of second order, of a tenth of an error, comes on top.
      expect(Math.abs(mean - exact)).toBeLessThan((4 / Math.sqrt(repeats) + 0.1) * stated)
    })
  })

  it('has errors that grow with the square root of the inefficiency, and the same parameters', () => {
    const histogram = sampled(HARMONIC_BOND, 20_000, 3)
    const plain = fitted(histogram, 'harmonic')
    const divided = fitForm(histogram, TEMPERATURE, 'harmonic', { inefficiency: 9 }) as FormFit
    expect(divided.independentSamples).toBeCloseTo((plain.independentSamples ?? NaN) / 9, 6)
    divided.parameters.forEach(({ value, standardError }, index) => {
      expect(value / plain.parameters[index].value).toBeCloseTo(1, 6)
      expect((standardError ?? NaN) / (plain.parameters[index].standardError ?? NaN)).toBeCloseTo(3, 6)
    })
  })

  it('commutes with a change of the unit of length', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.2, max: 5, noNaN: true }),
        fc.integer({ min: 1, max: 1000 }),
        (scale, seed) => {
          const histogram = sampled(HARMONIC_BOND, 3000, seed)
          const scaled = createHistogram({
            kind: 'bond',
            edges: histogram.edges.map((edge) => edge * scale),
            weights: histogram.weights,
            content: 'count',
          })
          const [k, r0] = valuesOf(fitted(histogram, 'harmonic'))
          const [scaledK, scaledR0] = valuesOf(fitted(scaled, 'harmonic'))
          expect((scaledK * scale ** 2) / k).toBeCloseTo(1, 7)
          expect(scaledR0 / scale / r0).toBeCloseTo(1, 9)
        },
      ),
      { numRuns: 20, seed: 4 },
    )
  })
})

describe('forms that do not fit', () => {
  it('refuses a quartic that would turn down outwards as unbounded', () => {
    const falling: SampledTerm = {
      ...HARMONIC_BOND,
      energy: (r) => 2500 * (r - 0.35) ** 2 - 60_000 * (r - 0.35) ** 4,
    }
    expect(refusalOf(sampled(falling, 1e6), 'quartic')).toBe('UNBOUNDED')
  })

  it('refuses a harmonic bond of a distribution that is lowest in its middle', () => {
    const hollow: SampledTerm = { ...HARMONIC_BOND, energy: (r) => -500 * (r - 0.35) ** 2 }
    expect(refusalOf(sampled(hollow, 1e5), 'harmonic')).toBe('UNBOUNDED')
  })

  it('refuses Morse where the bond is not softer outwards', () => {
    const mirrored: SampledTerm = { ...MORSE_BOND, energy: (r) => 20 * (1 - Math.exp(8 * (r - 0.5))) ** 2 }
    expect(refusalOf(sampled(mirrored, 1e5), 'morse')).toBe('DEGENERATE')
  })

  it('refuses a Gaussian that describes one bin', () => {
    const { kind, edges, weights } = sampled(HARMONIC_BOND, 20_000)
    const spiked = weights.map((count, bin) => (bin === 20 ? count + 2000 : count))
    const histogram = createHistogram({ kind, edges, weights: spiked, content: 'count' })
    expect(refusalOf(histogram, 'gaussians', 2)).toBe('DEGENERATE')
  })

  it('chooses no more Gaussians than there are states', () => {
    expect(fitted(sampled(HARMONIC_BOND, 1e5), 'gaussians').terms).toBe(1)
    expect(fitted(sampled(TWO_STATES, 1e5), 'gaussians').terms).toBe(2)
  })

  it('refuses forms with as many parameters as filled bins', () => {
    const histogram = createHistogram({
      kind: 'dihedral',
      edges: [-1, -0.6, -0.2, 0.2, 0.6, 1],
      weights: [10, 30, 50, 30, 10],
      content: 'count',
    })
    expect(refusalOf(histogram, 'cosine-series-phases', 3)).toBe('TOO_FEW_BINS')
  })

  it('chooses no number of terms without a sample size', () => {
    const { kind, edges, weights } = sampled(TWO_STATES, 1e5)
    const density = createHistogram({ kind, edges, weights, content: 'probability' })
    expect(refusalOf(density, 'gaussians')).toBe('SAMPLE_SIZE_UNKNOWN')
    expect(fitted(density, 'gaussians', 2).terms).toBe(2)
  })

  it.each([
    ['a form of another kind', 'morse', 'angle', null],
    ['a number of terms of a form that has none', 'harmonic', 'bond', 2],
    ['five Gaussians', 'gaussians', 'bond', 5],
    ['half a cosine', 'cosine-series', 'dihedral', 0.5],
  ] as const)('throws SETTING_INVALID for %s', (_, form, kind, terms) => {
    const term = { bond: HARMONIC_BOND, angle: HARMONIC_ANGLE, dihedral: THREE_COSINES }[kind]
    expect(() => fitForm(sampled(term, 1000), TEMPERATURE, form, { terms })).toThrow(
      expect.objectContaining({ code: 'SETTING_INVALID' }),
    )
  })

  it.each([0.5, NaN, 1e9])('throws SETTING_INVALID for an inefficiency of %d', (inefficiency) => {
    expect(() => fitForm(sampled(HARMONIC_BOND, 1000), TEMPERATURE, 'harmonic', { inefficiency })).toThrow(
      expect.objectContaining({ code: 'SETTING_INVALID' }),
    )
  })

  it('throws TOO_FEW_BINS and TEMPERATURE_INVALID as an inversion does', () => {
    const narrow = createHistogram({
      kind: 'bond',
      edges: [0.3, 0.31, 0.32, 0.33],
      weights: [1, 5, 1],
      content: 'count',
    })
    expect(() => fitForm(narrow, TEMPERATURE, 'harmonic')).toThrow(
      expect.objectContaining({ code: 'TOO_FEW_BINS' }),
    )
    expect(() => fitForm(sampled(HARMONIC_BOND, 1000), 0, 'harmonic')).toThrow(
      expect.objectContaining({ code: 'TEMPERATURE_INVALID' }),
    )
  })
})

describe('the region of the likelihood', () => {
  it('is the range alone where the histogram cuts the distribution off', () => {
    const cut: SampledTerm = { ...HARMONIC_BOND, range: [0.33, 0.5], bins: 40 }
    const [k, r0] = valuesOf(fitted(sampled(cut, 1e7), 'harmonic'))
    expect(k / 5000).toBeCloseTo(1, 4)
    expect(r0 / 0.35).toBeCloseTo(1, 5)
  })

  it('reaches beyond a histogram that ends with the samples: no bias from edges drawn around them', () => {
    const repeats = 200
    const errors = Array.from({ length: repeats }, (_, seed) => {
      const { edges, weights } = sampled(HARMONIC_BOND, 500, seed + 1)
      const first = weights.findIndex((count) => count > 0)
      const last = weights.findLastIndex((count) => count > 0)
      const trimmed = createHistogram({
        kind: 'bond',
        edges: edges.slice(first, last + 2),
        weights: weights.slice(first, last + 1),
        content: 'count',
      })
      const { value, standardError } = fitted(trimmed, 'harmonic').parameters[0]
      return (value - 5000) / (standardError ?? NaN)
    })
    const mean = errors.reduce((sum, error) => sum + error, 0) / repeats
    // Conditional on the range the mean is −0.35; a k from 500 samples has a bias of +0.1 of its error.
    expect(Math.abs(mean - 0.1)).toBeLessThan(4 / Math.sqrt(repeats))
  })

  it('has θ0 held at 180° where the best one lies beyond, without a standard error', () => {
    for (const form of ['harmonic', 'cosine-harmonic'] as const) {
      const { parameters, covariance } = fitted(sampled(STRAIGHT_ANGLE, 1e5), form)
      expect(parameters[1]).toMatchObject({ name: 'θ0', value: Math.PI, standardError: null, atBound: true })
      expect(parameters[0].standardError).toBeGreaterThan(0)
      expect(covariance?.slice(1)).toEqual(new Float64Array(3))
    }
  })
})

describe('parameters in the units of a user', () => {
  it.each([
    ['nm', 'kJ/mol', 5000, 'kJ/mol/nm²', 0.35, 'nm'],
    ['angstrom', 'kJ/mol', 50, 'kJ/mol/Å²', 3.5, 'Å'],
    ['angstrom', 'kcal/mol', 50 / 4.184, 'kcal/mol/Å²', 3.5, 'Å'],
  ] as const)('of a bond in %s and %s', (coordinate, energy, k, kUnit, r0, r0Unit) => {
    const [stiffness, centre] = parametersInUnits(
      fitted(sampled(HARMONIC_BOND, 1e8), 'harmonic'),
      coordinate,
      energy,
    )
    expect(stiffness).toMatchObject({ name: 'k', unit: kUnit })
    expect(centre).toMatchObject({ name: 'r0', unit: r0Unit })
    expect(stiffness.value / k).toBeCloseTo(1, 5)
    expect(centre.value / r0).toBeCloseTo(1, 6)
  })

  it('of an angle in degrees, the same energy at the same place', () => {
    const fit = fitted(sampled(HARMONIC_ANGLE, 1e8), 'harmonic')
    const [k, centre] = parametersInUnits(fit, 'degree', 'kJ/mol')
    expect(k.unit).toBe('kJ/mol/deg²')
    expect(centre.unit).toBe('°')
    const degrees = 100
    const radians = (degrees * Math.PI) / 180
    expect(0.5 * k.value * (degrees - centre.value) ** 2).toBeCloseTo(
      0.5 * fit.parameters[0].value * (radians - fit.parameters[1].value) ** 2,
      9,
    )
  })

  it('leaves pure numbers alone and gives Morse its 1/Å', () => {
    const morse = parametersInUnits(fitted(sampled(MORSE_BOND, 1e6), 'morse'), 'angstrom', 'kT')
    expect(morse.map(({ unit }) => unit)).toEqual(['kT', '1/Å', 'Å'])
    const states = fitted(sampled(TWO_STATES, 1e6), 'gaussians', 2)
    const shown = parametersInUnits(states, 'angstrom', 'kT')
    expect(shown.map(({ unit }) => unit)).toEqual(['', 'Å', 'Å', '', 'Å', 'Å'])
    expect(shown[0].value).toBe(states.parameters[0].value)
  })
})
