import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { createHistogram, type Histogram } from '@shared/histogram'
import {
  DEFAULT_INVERSION_SETTINGS,
  invert,
  type InversionSettings,
  type Potential,
  potentialCurvature,
  potentialEnergy,
  potentialSlope,
  type SmoothingSettings,
} from '@shared/inversion'
import { createRandom } from '@shared/numeric'
import { makeTable } from '@shared/tables'
import { thermalEnergy } from '@shared/units'
import { edgesOf } from '../../../support/exact-histograms'

const TEMPERATURE = 400
const KT = thermalEnergy(TEMPERATURE)
const LEVEL: InversionSettings = { ...DEFAULT_INVERSION_SETTINGS, straightAngle: 'level' }
const MODES: readonly SmoothingSettings[] = [
  { mode: 'auto', criterion: 'likelihood' },
  { mode: 'manual', log10Lambda: 2 },
  { mode: 'off' },
]

/** An angle about a middle in rad, sampled with Poisson noise up to `high`. */
function angle(middle: number, samples: number, seed: number, bins = 90, high = Math.PI): Histogram {
  const edges = edgesOf(0, high, bins)
  const random = createRandom(seed)
  const shares = edges.slice(1).map((edge, bin) => {
    const theta = (edge + edges[bin]) / 2
    return Math.sin(theta) * Math.exp(-8 * (theta - middle) ** 2)
  })
  const total = shares.reduce((sum, share) => sum + share, 0)
  const weights = shares.map((share) => random.poisson((samples * share) / total))
  return createHistogram({ kind: 'angle', edges, weights, content: 'count' })
}

const places = (low: number, high: number, count: number) =>
  Array.from({ length: count }, (_, place) => low + ((high - low) * place) / (count - 1))

/** Differences of the energy against the slope, and of the slope against the curvature, joins included. */
function expectOneCurve(potential: Potential, low: number, high: number): void {
  const step = 1e-6
  for (const q of places(low + step, high - step, 301)) {
    const slope = (potentialEnergy(potential, q + step) - potentialEnergy(potential, q - step)) / (2 * step)
    // Second-order differences: step² times the third derivative, and the step a join may have in curvature.
    const scale = 1 + Math.abs(slope) + step * Math.abs(potentialCurvature(potential, q))
    expect(Math.abs(slope - potentialSlope(potential, q)) / scale).toBeLessThan(1e-4)
  }
}

describe('an angle that is to be level at 180°', () => {
  it.each(MODES)('has no slope there, wherever its data end: $mode', (smoothing) => {
    fc.assert(
      fc.property(
        fc.constantFrom(1.9, 2.6, 3),
        fc.constantFrom(Math.PI, 3, 2.7),
        fc.constantFrom(60, 90, 500),
        fc.integer({ min: 0, max: 1e6 }),
        (middle, high, bins, seed) => {
          const { potential } = invert(angle(middle, 20_000, seed, bins, high), TEMPERATURE, {
            ...LEVEL,
            smoothing,
          })
          expect(Math.abs(potentialSlope(potential, Math.PI))).toBeLessThan(1e-6 * KT)
          expect(Math.abs(potentialEnergy(potential, Math.PI))).toBeLessThan(1e6 * KT)
        },
      ),
      { numRuns: 15, seed: 20261201 },
    )
  })

  it.each(MODES)('has a force that is minus the slope of its energy: $mode', (smoothing) => {
    for (const high of [Math.PI, 2.9]) {
      const { potential, minimum } = invert(angle(2.6, 20_000, 1, 60, high), TEMPERATURE, {
        ...LEVEL,
        smoothing,
      })
      expectOneCurve(potential, 1.5, Math.PI)
      expect(potentialEnergy(potential, minimum.coordinate)).toBeCloseTo(0, 9)
      const least = Math.min(...places(0, Math.PI, 2001).map((theta) => potentialEnergy(potential, theta)))
      expect(least).toBeGreaterThanOrEqual(-1e-9)
    }
  })

  it('turns at most once beyond its data, from falling to rising', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 1e6 }), fc.constantFrom(1.9, 2.5, 2.9), (seed, middle) => {
        const { potential } = invert(angle(middle, 2000, seed), TEMPERATURE, LEVEL)
        const slopes = places(potential.populated[1], Math.PI, 60).map((theta) =>
          potentialSlope(potential, theta),
        )
        const rises = slopes.findIndex((slope) => slope > 1e-9)
        if (rises >= 0) slopes.slice(rises).forEach((slope) => expect(slope).toBeGreaterThan(-1e-9))
      }),
      { numRuns: 60 },
    )
  })

  it('is left alone elsewhere: the curve of a bent angle hardly changes', () => {
    const histogram = angle(1.9, 50_000, 3)
    const [free, level] = [DEFAULT_INVERSION_SETTINGS, LEVEL].map((settings) =>
      invert(histogram, TEMPERATURE, settings),
    )
    for (const theta of places(1.5, 2.3, 30)) {
      const change = potentialEnergy(free.potential, theta) - potentialEnergy(level.potential, theta)
      expect(Math.abs(change)).toBeLessThan(0.02 * KT)
    }
  })
})

describe('tails', () => {
  const bond = createHistogram({
    kind: 'bond',
    edges: edgesOf(0.3, 0.5, 40),
    weights: edgesOf(0.3, 0.5, 40)
      .slice(1)
      .map((r) => Math.round(5000 * Math.exp(-(((r - 0.4) / 0.03) ** 2)))),
    content: 'count',
  })
  const stiff = (stiffness: number) =>
    invert(bond, TEMPERATURE, { ...DEFAULT_INVERSION_SETTINGS, tails: { stiffness } }).potential

  it('bend at least as much as the settings say, in kT over the variance of the data', () => {
    const variance = 0.03 ** 2 / 2
    // The bins are 0.17 of the deviation wide, which adds 0.2 % to the variance; rounding of counts does the rest.
    for (const stiffness of [2, 5, 20]) {
      const { highTail } = stiff(stiffness)
      expect((highTail?.curvature ?? 0) / ((stiffness * KT) / variance)).toBeCloseTo(1, 1)
    }
    // A spring with the spread of the data already bends more than half of that.
    expect((stiff(0.05).highTail?.curvature ?? 0) / (KT / variance)).toBeCloseTo(1, 0)
  })

  it('join the spline in energy and slope', () => {
    for (const stiffness of [0.5, 20]) expectOneCurve(stiff(stiffness), 0.2, 0.7)
  })

  it('stay consistent under a cap: the force fades as the energy levels off, and is 0 at the cap', () => {
    const { energies, forces, coordinates } = makeTable(stiff(0.5), {
      rows: 20_001,
      low: null,
      high: null,
      cap: 20,
    })
    const step = coordinates[1] - coordinates[0]
    for (let row = 1; row < 20_000; row++) {
      const slope = (energies[row + 1] - energies[row - 1]) / (2 * step)
      // Central differences over 0.00002 nm where the curvature jumps by some 10⁵ kJ/mol/nm² at most.
      expect(Math.abs(slope + forces[row])).toBeLessThan(2)
    }
    expect(energies[0]).toBe(20)
    expect(forces[0]).toBeCloseTo(0, 12)
  })
})
