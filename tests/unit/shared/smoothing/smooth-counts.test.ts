import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { binMidpoints, binVolumes, coordinateDomain, jacobian } from '@shared/histogram'
import { createRandom } from '@shared/numeric'
import {
  type BinGeometry,
  identityBasis,
  IDENTITY_BINS,
  logEffectiveVolumes,
  penalisedFit,
  penalisedSystem,
  smoothCounts,
  type SmoothDensity,
} from '@shared/smoothing'
import { edgesOf } from '../../../support/exact-histograms'

function geometryOf(kind: 'bond' | 'angle' | 'dihedral', edges: readonly number[]): BinGeometry {
  const bins = Float64Array.from(edges)
  return {
    edges: bins,
    midpoints: binMidpoints(bins),
    volumes: binVolumes(kind, bins),
    jacobian: (coordinate) => jacobian(kind, coordinate),
    period: kind === 'dihedral' ? 2 * Math.PI : null,
    mirrored: false,
  }
}

/** Poisson counts about a density, `samples` in all. */
function drawn(
  { midpoints, volumes }: BinGeometry,
  density: (q: number) => number,
  samples: number,
  seed: number,
): Float64Array {
  const random = createRandom(seed)
  const shares = volumes.map((volume, bin) => volume * density(midpoints[bin]))
  const total = shares.reduce((sum, share) => sum + share, 0)
  return shares.map((share) => random.poisson((samples * share) / total))
}

const sum = (values: Float64Array) => values.reduce((total, value) => total + value, 0)
const torsion = (phi: number) => Math.exp(-1.5 * Math.cos(3 * phi) - 0.8 * Math.cos(phi))
const turn = (bins: number) => geometryOf('dihedral', edgesOf(...coordinateDomain('dihedral'), bins))
const spring = (r: number) => Math.exp(-750 * (r - 0.35) ** 2)
const stretch = (bins: number) => geometryOf('bond', edgesOf(0.23, 0.47, bins))

describe('a smooth density', () => {
  it('keeps the number of samples, for any counts and any λ', () => {
    const counts = fc.array(fc.integer({ min: 0, max: 500 }), { minLength: 30, maxLength: 30 })
    fc.assert(
      fc.property(counts, fc.double({ min: -2, max: 14, noNaN: true }), (values, log10Lambda) => {
        fc.pre(values.filter((count) => count > 0).length >= 5)
        const observed = Float64Array.from(values)
        for (const geometry of [turn(30), stretch(30)]) {
          const { means } = smoothCounts(geometry, observed, { log10Lambda })
          // The weak hold on the coefficients, 1e-8 counts strong, takes a trace of a sample.
          expect(sum(means) / sum(observed)).toBeCloseTo(1, 6)
        }
      }),
      { numRuns: 60 },
    )
  })

  it('keeps the first two moments of what does not close on itself', () => {
    const geometry = stretch(60)
    const counts = drawn(geometry, spring, 5000, 1)
    const { means } = smoothCounts(geometry, counts, { log10Lambda: 4 })
    for (const power of [1, 2]) {
      const moment = (weights: Float64Array) => sum(weights.map((weight, bin) => weight * bin ** power))
      expect(moment(means) / moment(counts)).toBeCloseTo(1, 6)
    }
  })

  it('turns with its counts on a circle', () => {
    const geometry = turn(36)
    const counts = drawn(geometry, torsion, 3000, 2)
    const shift = 7
    const turned = counts.map((_, bin) => counts[(bin + shift) % 36])
    const [one, other] = [counts, turned].map((each) => smoothCounts(geometry, each, { by: 'likelihood' }))
    expect(other.log10Lambda).toBe(one.log10Lambda)
    other.eta.forEach((value, bin) => expect(value).toBeCloseTo(one.eta[(bin + shift) % 36], 7))
    other.deviations.forEach((value, bin) => expect(value).toBeCloseTo(one.deviations[(bin + shift) % 36], 7))
  })

  it('has no deviation at its most likely place, and a smaller one everywhere with more samples', () => {
    const geometry = turn(36)
    const few = drawn(geometry, torsion, 3000, 3)
    const [before, after] = [few, few.map((count) => 100 * count)].map((counts) =>
      smoothCounts(geometry, counts, { log10Lambda: 2 }),
    )
    const mode = before.eta.indexOf(Math.max(...before.eta))
    expect(before.deviations[mode]).toBe(0)
    before.deviations.forEach((value, bin) => {
      if (bin !== mode) expect(after.deviations[bin]).toBeLessThan(value)
    })
  })

  it('is one curve on either side of the number of bins at which the basis changes', () => {
    const sizes = [IDENTITY_BINS, IDENTITY_BINS + 1]
    const [identity, splines] = sizes.map((bins): [BinGeometry, SmoothDensity] => {
      const geometry = turn(bins)
      const counts = geometry.volumes.map((volume, bin) => 1e4 * volume * torsion(geometry.midpoints[bin]))
      return [geometry, smoothCounts(geometry, counts, { by: 'likelihood' })]
    })
    // Log-densities at the same places, by straight lines between the midpoints, whose error is h²η″/8 < 5e-4.
    const at = ([{ midpoints }, { eta }]: [BinGeometry, SmoothDensity], q: number) => {
      const next = midpoints.findIndex((midpoint) => midpoint > q)
      const share = (q - midpoints[next - 1]) / (midpoints[next] - midpoints[next - 1])
      return eta[next - 1] + share * (eta[next] - eta[next - 1])
    }
    for (const q of [-3, -2, -1, 0, 1, 2, 3]) {
      expect(Math.abs(at(identity, q) - at(splines, q))).toBeLessThan(0.005)
    }
  })
})

describe('the effective dimension', () => {
  it.each([
    ['a bond', 3, stretch, spring],
    ['a dihedral', 1, turn, () => 1],
  ] as const)('of %s falls with λ, down to %d', (_, least, geometryFor, density) => {
    for (const bins of [60, 180, 390, 500]) {
      const geometry = geometryFor(bins)
      const counts = drawn(geometry, density, 300, bins)
      const dimensions = Array.from(
        { length: 34 },
        (_unused, step) => smoothCounts(geometry, counts, { log10Lambda: step / 2 - 1 }).effectiveDimension,
      )
      dimensions.slice(1).forEach((dimension, step) => {
        // λ is chosen by how the dimension falls towards its limit: rounding must stay far below 0.02.
        expect(dimension).toBeLessThan(dimensions[step] + 1e-3)
        expect(dimension).toBeGreaterThan(least - 1e-3)
      })
      expect(dimensions[dimensions.length - 1]).toBeCloseTo(least, 2)
    }
  })
})

/** What Fellner and Schall's update asks log10 λ of a bond to move by: 0 at a maximum of the evidence. */
function pull(geometry: BinGeometry, counts: Float64Array, log10Lambda: number): number {
  const { eta } = smoothCounts(geometry, counts, { log10Lambda })
  const system = penalisedSystem(identityBasis(geometry.midpoints, geometry.period))
  const offsets = logEffectiveVolumes(geometry)(eta)
  const fit = penalisedFit(system, counts, offsets, 10 ** log10Lambda, null)
  return Math.log10((fit.effectiveDimension - 3) / fit.roughness) - log10Lambda
}

describe('the choice of λ', () => {
  it('by likelihood stops at the first maximum of the evidence and does not run on to the stiff limit', () => {
    // Nearly harmonic data with a faint second state: beyond the maximum the evidence is almost level.
    const geometry = geometryOf('bond', edgesOf(0.2, 0.5, 180))
    const density = (r: number) => spring(r) + 0.02 * Math.exp(-0.5 * ((r - 0.4) / 0.02) ** 2)
    for (const seed of [1, 8, 12, 14, 25, 28]) {
      const counts = drawn(geometry, density, 3000, seed)
      const { log10Lambda } = smoothCounts(geometry, counts, { by: 'likelihood' })
      const near = [-0.5, 0, 0.5].map((step) => pull(geometry, counts, log10Lambda + step))
      // Fellner–Schall's update asks for more λ below a maximum and for less above it.
      expect(near[0]).toBeGreaterThan(0)
      expect(Math.abs(near[1])).toBeLessThan(0.02)
      expect(near[2]).toBeLessThan(0)
    }
  })

  it.each(['likelihood', 'aic'] as const)('by %s ends for data that are flat to the last count', (by) => {
    const { eta, effectiveDimension } = smoothCounts(turn(72), new Float64Array(72).fill(1000), { by })
    expect(effectiveDimension).toBeCloseTo(1, 1)
    eta.forEach((value) => expect(value).toBeCloseTo(eta[0], 9))
  })

  it('is rounded to a hundredth', () => {
    const geometry = turn(36)
    const counts = drawn(geometry, torsion, 3000, 4)
    for (const by of ['likelihood', 'aic'] as const) {
      const { log10Lambda } = smoothCounts(geometry, counts, { by })
      expect(log10Lambda).toBe(Math.round(log10Lambda * 100) / 100)
    }
  })

  it('by AIC is not beaten by any other λ nearby', () => {
    const geometry = turn(72)
    const counts = drawn(geometry, torsion, 3000, 5)
    const akaike = (log10Lambda: number) => {
      const { means, effectiveDimension } = smoothCounts(geometry, counts, { log10Lambda })
      const deviances = means.map((mean, bin) =>
        counts[bin] > 0 ? counts[bin] * Math.log(counts[bin] / mean) - counts[bin] + mean : mean,
      )
      return 2 * sum(deviances) + 2 * effectiveDimension
    }
    const { log10Lambda } = smoothCounts(geometry, counts, { by: 'aic' })
    for (const step of [-1, -0.3, -0.1, 0.1, 0.3, 1]) {
      // The search looks at one set of effective volumes at a time: a thousandth may be left.
      expect(akaike(log10Lambda + step)).toBeGreaterThan(akaike(log10Lambda) - 0.01)
    }
  })
})
