import { describe, expect, it } from 'vitest'
import {
  fitForm,
  formDeviations,
  formEnergy,
  type FormFit,
  type FormName,
  formPotential,
} from '@shared/forms'
import { type Potential, potentialEnergy, potentialSlope } from '@shared/inversion'
import {
  COSINE_ANGLE,
  HARMONIC_ANGLE,
  HARMONIC_BOND,
  KT,
  MORSE_BOND,
  QUARTIC_BOND,
  type SampledTerm,
  sampled,
  SKEWED_TURN,
  TEMPERATURE,
  THREE_COSINES,
  TWO_STATES,
} from './samples'

const FORMS: readonly (readonly [FormName, SampledTerm])[] = [
  ['harmonic', HARMONIC_BOND],
  ['morse', MORSE_BOND],
  ['quartic', QUARTIC_BOND],
  ['gaussians', TWO_STATES],
  ['harmonic', HARMONIC_ANGLE],
  ['cosine-harmonic', COSINE_ANGLE],
  ['cosine-series', THREE_COSINES],
  ['cosine-powers', THREE_COSINES],
  ['cosine-series-phases', SKEWED_TURN],
]

function fitted(form: FormName, term: SampledTerm): FormFit {
  const fit = fitForm(sampled(term, 20_000, 7), TEMPERATURE, form)
  if (fit.outcome === 'refused') throw new Error(`${form} was refused: ${fit.message}`)
  return fit
}

/** `count` places over the knots of the potential, none of them on a knot. */
function placesOf({ kind, knots }: Potential, count: number): number[] {
  const [low, high] = kind === 'dihedral' ? [-Math.PI, Math.PI] : [knots[0], knots[knots.length - 1]]
  return Array.from({ length: count }, (_, place) => low + ((high - low) * (place + 0.377)) / count)
}

describe.each(FORMS)('the potential of a %s form', (form, term) => {
  const fit = fitted(form, term)
  const potential = formPotential(fit)
  const places = placesOf(potential, 3001)

  it('is the formula with its parameters, to a millionth of kT, with least value 0', () => {
    const exact = places.map((place) => formEnergy(fit, place))
    const spline = places.map((place) => potentialEnergy(potential, place))
    const constants = exact.map((energy, index) => energy - spline[index])
    const least = spline.indexOf(Math.min(...spline))
    // Energies of thousands of kT are hit to a hundred-millionth of themselves.
    const misses = constants.map(
      (constant, index) => Math.abs(constant - constants[least]) / (KT + 0.01 * spline[index]),
    )
    expect(Math.max(...misses)).toBeLessThan(1e-6)
    expect(Math.min(...spline)).toBeGreaterThan(-1e-9)
    // The finest grid of places misses the minimum by less than its square does in U.
    expect(Math.min(...spline)).toBeLessThan(0.01 * KT)
  })

  it('has the slope of its own energy', () => {
    const step = 1e-6
    // Rounding of a difference over 2e-6, and its second order.
    const misses = places.map((place) => {
      const difference =
        (potentialEnergy(potential, place + step) - potentialEnergy(potential, place - step)) / (2 * step)
      const slope = potentialSlope(potential, place)
      return Math.abs(slope - difference) / (1 + 0.01 * Math.abs(slope))
    })
    expect(Math.max(...misses)).toBeLessThan(1e-3)
  })

  it('knows its errors from the parameters: 0 at its minimum, positive elsewhere, finite', () => {
    const { deviations, knots } = potential
    if (deviations === null) throw new Error('The sample size is known.')
    expect(deviations).toHaveLength(knots.length)
    expect(deviations.every((deviation) => deviation >= 0 && Number.isFinite(deviation))).toBe(true)
    expect(Math.min(...deviations)).toBeLessThan(0.01 * KT)
    expect(Math.max(...deviations)).toBeGreaterThan(0.01 * KT)
  })
})

describe('the reach of a form', () => {
  it('is the turn for a dihedral, 0 to 180° for an angle, without tails', () => {
    const turn = formPotential(fitted('cosine-series', THREE_COSINES))
    expect(turn).toMatchObject({ period: 2 * Math.PI, lowTail: null, highTail: null })
    const angle = formPotential(fitted('cosine-harmonic', COSINE_ANGLE))
    expect([angle.knots[0], angle.knots.at(-1)]).toEqual([0, Math.PI])
    expect([angle.lowTail, angle.highTail]).toEqual([null, null])
  })

  it('goes as far for a bond as asked, and on by a tail that never turns down', () => {
    const fit = fitted('morse', MORSE_BOND)
    const potential = formPotential(fit, [0.05, 2])
    expect([potential.knots[0], potential.knots.at(-1)]).toEqual([0.05, 2])
    expect(potentialEnergy(potential, 1.7) - potentialEnergy(potential, 1.2)).toBeCloseTo(
      formEnergy(fit, 1.7) - formEnergy(fit, 1.2),
      6,
    )
    expect(potentialSlope(potential, 3)).toBeGreaterThan(potentialSlope(potential, 2.5))
  })

  it('of a harmonic bond continues as the same parabola', () => {
    const fit = fitted('harmonic', HARMONIC_BOND)
    const potential = formPotential(fit)
    expect(potentialEnergy(potential, 3) / formEnergy(fit, 3)).toBeCloseTo(1, 8)
  })

  it('of Gaussians stays finite where every one of them vanishes', () => {
    const fit = fitted('gaussians', TWO_STATES)
    expect(formEnergy(fit, 50)).toBeLessThan(Infinity)
    expect(formEnergy(fit, 50)).toBeGreaterThan(1e5)
  })

  it('has no errors without a sample size', () => {
    const fit = fitted('harmonic', HARMONIC_BOND)
    expect(formPotential({ ...fit, covariance: null }).deviations).toBeNull()
  })
})

describe('the errors of a form', () => {
  it('are those that repeated samples scatter by', () => {
    const repeats = 150
    const [place, minimum] = [2.5, 2]
    const fits = Array.from({ length: repeats }, (_, seed) =>
      fitForm(sampled(HARMONIC_ANGLE, 2000, seed + 1), TEMPERATURE, 'harmonic'),
    ).filter((fit) => fit.outcome === 'fitted')
    const values = fits.map((fit) => formEnergy(fit, place) - formEnergy(fit, minimum))
    const mean = values.reduce((sum, value) => sum + value, 0) / repeats
    const scatter = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (repeats - 1))
    const stated = fits.map((fit) => formDeviations(fit, Float64Array.of(place), minimum)?.[0] ?? NaN)
    const typical = stated.reduce((sum, value) => sum + value, 0) / repeats
    // The scatter of 150 values is known to 6 %: four of them.
    expect(Math.abs(scatter / typical - 1)).toBeLessThan(0.24)
  })
})
