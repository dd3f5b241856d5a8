import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { basinsAtDepth, curveBasins } from '@shared/basins'
import { createHistogram } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert } from '@shared/inversion'
import { createRandom } from '@shared/numeric'
import { edgesOf } from '../../../support/exact-histograms'
import { SPLINE_KNOTS, splinePotential } from '../../../support/spline-potential'

const TEMPERATURE = 400

const TURN = [-Math.PI, Math.PI] as const

describe('curveBasins', () => {
  it('finds the three wells of a torsion at their exact places, around the turn', () => {
    // Analytic: U = 2(1 + cos 3φ) has wells 4 kT deep at 180° and ±60°; the tilt makes that at 180° the lowest.
    const torsion = splinePotential(
      'dihedral',
      TURN,
      (phi) => 2 * (1 + Math.cos(3 * phi)) + 0.001 * Math.cos(phi),
    )
    const { basins } = curveBasins(torsion)
    expect(basins.map(({ depth }) => depth === null)).toEqual([true, false, false])
    const degrees = basins.map(({ coordinate }) => Math.abs((coordinate * 180) / Math.PI))
    // The spline of 4° knots is within 1e-4 of the cosine.
    expect(Math.abs(degrees[0] - 180)).toBeLessThan(0.05)
    for (const gauche of degrees.slice(1)) expect(Math.abs(gauche - 60)).toBeLessThan(0.05)
    for (const { depth } of basins.slice(1)) expect(depth).toBeCloseTo(4, 2)
    for (const { population } of basins) expect(population).toBeCloseTo(1 / 3, 3)
  })

  it('shares the probability with its Jacobian', () => {
    // Two equal wells of a bond, at 0.2 and 0.4 nm: with r² the outer one holds nearly 0.4²/(0.2² + 0.4²) = 0.8 of all.
    const wells = splinePotential(
      'bond',
      [0.1, 0.5],
      (r) => 8 * (1 + Math.cos((r * 2 * Math.PI) / 0.2 + Math.PI)),
    )
    const outer = (useJacobian: boolean) =>
      curveBasins(wells, undefined, useJacobian).basins.find(({ coordinate }) => coordinate > 0.3)?.population
    expect(outer(true)).toBeCloseTo(0.8, 1)
    expect(outer(false)).toBeCloseTo(0.5, 1)
  })

  it('takes an end of the data towards which the energy falls for a minimum', () => {
    const { basins } = curveBasins(
      splinePotential('angle', [1.5, Math.PI], (theta) => 3 * Math.sin(2 * (theta - 1.5))),
    )
    expect(basins.map(({ coordinate }) => coordinate > 2.5 || coordinate === 1.5)).toEqual([true, true])
  })

  it('makes one basin of a flat curve', () => {
    const { basins, curve } = curveBasins(splinePotential('dihedral', TURN, () => 1))
    expect(basins).toHaveLength(1)
    expect(basins[0].population).toBeCloseTo(1, 12)
    expect(basinsAtDepth(curve, 0.01)).toBe(1)
  })

  it('noise below the depth asked for adds no basin to a well', () => {
    fc.assert(
      fc.property(fc.nat(), (seed) => {
        const random = createRandom(seed)
        // A spline overshoots the noise at its knots by a quarter at most in practice: 0.35 kT stays below 0.5 kT.
        const noise = Float64Array.from({ length: SPLINE_KNOTS }, () => 0.35 * random.uniform())
        const well = splinePotential('bond', [0.2, 0.4], (r, knot) => 2000 * (r - 0.3) ** 2 + noise[knot])
        const { basins, curve, threshold } = curveBasins(well)
        expect(threshold.depth).toBe(0.5)
        expect(basins).toHaveLength(1)
        expect(basinsAtDepth(curve, 0.01)).toBeGreaterThan(1)
      }),
      { numRuns: 50 },
    )
  })

  it('reads the same from either side', () => {
    const energies = fc.array(fc.double({ min: 0, max: 6, noNaN: true }), {
      minLength: SPLINE_KNOTS,
      maxLength: 90,
    })
    fc.assert(
      fc.property(energies, (values) => {
        const forth = curveBasins(splinePotential('dihedral', TURN, (_, knot) => values[knot]))
        const back = curveBasins(
          splinePotential('dihedral', TURN, (_, knot) => values[SPLINE_KNOTS - 1 - knot]),
        )
        // Which of two equal wells is called the lowest may differ; the depths may not.
        const deep = ({ curve }: typeof forth) => curve.steps.filter(({ depth }) => depth > 1e-6)
        expect(deep(back)).toHaveLength(deep(forth).length)
        deep(back).forEach(({ depth }, step) => expect(depth).toBeCloseTo(deep(forth)[step].depth, 8))
      }),
      { numRuns: 30 },
    )
  })
})

describe('basins of an inversion', () => {
  const edges = edgesOf(0.2, 0.4, 60)

  /** Poisson counts of one normal peak, or of two. */
  function inverted(samples: number, seed: number, places: readonly number[], scale = 1) {
    const random = createRandom(seed)
    const weights = edges.slice(1).map((edge, bin) => {
      const middle = (edge + edges[bin]) / 2
      const mass = places.reduce((sum, place) => sum + Math.exp(-(((middle - place) / 0.015) ** 2) / 2), 0)
      return scale * random.poisson((samples * mass) / (11.3 * places.length))
    })
    const histogram = createHistogram({
      kind: 'bond',
      edges,
      weights,
      content: 'count',
      independentSamples: samples * 0.5,
    })
    return invert(histogram, TEMPERATURE, DEFAULT_INVERSION_SETTINGS)
  }

  it.each([300, 3000, 30_000])(
    'one noisy peak of %d samples is one basin in 40 seeded repeats',
    (samples) => {
      for (let seed = 0; seed < 40; seed++) {
        expect(curveBasins(inverted(samples, seed, [0.3]).potential).basins).toHaveLength(1)
      }
    },
  )

  it('two peaks are two basins with equal shares and a known deviation, however the counts are scaled', () => {
    const { basins } = curveBasins(inverted(20_000, 3, [0.26, 0.34]).potential)
    expect(basins).toHaveLength(2)
    // Equal peaks; the share of one is known to √(¼/20,000), 0.004.
    expect(basins[0].population).toBeCloseTo(0.5, 1)
    // Analytic: between normal peaks 5.33 σ apart the density falls by 2 exp(−5.33²/8) = 0.057: 2.9 kT, and less volume at 0.26.
    expect(basins[1].depth).toBeGreaterThan(2.3)
    expect(basins[1].depth).toBeLessThan(3.4)
    expect(basins[1].deviation).toBeGreaterThan(0)
    expect(basins[1].deviation).toBeLessThan(0.3)
    const scaled = curveBasins(inverted(20_000, 3, [0.26, 0.34], 16).potential).basins
    scaled.forEach(({ depth, coordinate }, index) => {
      expect(coordinate).toBeCloseTo(basins[index].coordinate, 6)
      expect(depth ?? 0).toBeCloseTo(basins[index].depth ?? 0, 6)
    })
  })
})
