import { describe, expect, it } from 'vitest'
import { correlate, type Correlation } from '@shared/correlation'
import { accumulateJoint, type CoordinateKind, createJointHistogram } from '@shared/histogram'
import { createRandom, type Random } from '@shared/numeric'
import { edgesOf } from '../../../support/exact-histograms'

type Draw = (random: Random) => readonly [number, number]
type Kinds = readonly [CoordinateKind, CoordinateKind]

/** Where numbers between −5 and 5 are put, so that each kind stands inside its domain. */
const PLACES: Record<CoordinateKind, readonly [centre: number, unit: number]> = {
  bond: [0.35, 0.01],
  angle: [2, 0.1],
  dihedral: [0, Math.PI / 5],
}

function correlationOf(
  draw: Draw,
  samples: number,
  bins: readonly [number, number] = [90, 120],
  seed = 1,
  kinds: Kinds = ['bond', 'angle'],
): Correlation {
  const random = createRandom(seed)
  const inside = (value: number) => Math.abs(value) < 5
  const [first, second] = [new Float64Array(samples), new Float64Array(samples)]
  const [x, y] = kinds.map((kind) => PLACES[kind])
  for (let kept = 0; kept < samples;) {
    const [a, b] = draw(random)
    if (!inside(a) || !inside(b)) continue
    first[kept] = x[0] + x[1] * a
    second[kept++] = y[0] + y[1] * b
  }
  const edges = ([centre, unit]: readonly [number, number], count: number) =>
    Float64Array.from(edgesOf(centre - 5 * unit, centre + 5 * unit, count))
  const [xEdges, yEdges] = [edges(x, bins[0]), edges(y, bins[1])]
  const weights = accumulateJoint(first, second, xEdges, yEdges)
  return correlate(createJointHistogram({ kinds, xEdges, yEdges, weights, content: 'count' }), { seed })
}

const numbers = ({ basins }: Correlation) =>
  basins && [basins.map.basins.length, basins.product.basins.length, basins.mapOnly, basins.productOnly]

const independent: Draw = (random) => [random.normal(), random.normal()]
const well = (random: Random) => (random.uniform() < 0.5 ? -2 : 2) + 0.6 * random.normal()
/** One side of the diagonal or the other, along it as wide as both: each coordinate alone has one peak. */
const ridges: Draw = (random) => {
  const along = 1.5 * random.normal()
  const across = (random.uniform() < 0.5 ? -1 : 1) + 0.35 * random.normal()
  return [(along + across) * Math.SQRT1_2, (along - across) * Math.SQRT1_2]
}
/** Three samples in a hundred sit apart where both coordinates are unusual; alone each shows no more than a shoulder. */
const minority: Draw = (random) =>
  random.uniform() < 0.03 ? [2.7 + 0.4 * random.normal(), 2.7 + 0.4 * random.normal()] : independent(random)

describe('basins of the map against those of the product', () => {
  it('two separable double wells have four basins in both and stay separable', () => {
    for (const [samples, bins] of [
      [2000, [90, 120]],
      [2000, [40, 40]],
      [50_000, [90, 120]],
    ] as const) {
      const correlation = correlationOf((random) => [well(random), well(random)], samples, bins)
      expect(numbers(correlation)).toEqual([4, 4, 0, 0])
      expect(correlation.verdict).toBe('separable')
    }
  })

  it('a double well along the diagonal lacks two of the product’s basins, which alone advises nothing', () => {
    const correlation = correlationOf((random) => {
      const side = random.uniform() < 0.5 ? -2 : 2
      return [side + 0.6 * random.normal(), side + 0.6 * random.normal()]
    }, 10_000)
    expect(numbers(correlation)).toEqual([2, 4, 0, 2])
    const codes = correlation.warnings.map(({ code }) => code)
    expect(codes).not.toContain('BASINS_BEYOND_PRODUCT')
    const { map, product } = correlation.basins!
    map.basins.forEach(({ counterpart, x, y }, index) => {
      const like = product.basins[counterpart ?? -1]
      expect(like.counterpart).toBe(index)
      // Two spreads of a well apart at most: the map's minimum lies in the product's basin.
      expect(Math.abs(like.x - x)).toBeLessThan(0.012)
      expect(Math.abs(like.y - y)).toBeLessThan(0.12)
    })
    expect(map.basins.reduce((sum, { population }) => sum + (population ?? 0), 0)).toBeCloseTo(1, 10)
  })

  it('two ridges have a basin that the product lacks', () => {
    const correlation = correlationOf(ridges, 5000)
    expect(numbers(correlation)).toEqual([2, 1, 1, 0])
    expect(correlation.verdict).toBe('joint')
  })

  it('a minority basin advises a joint potential although its information alone would not', () => {
    const correlation = correlationOf(minority, 20_000)
    expect(numbers(correlation)).toEqual([2, 1, 1, 0])
    expect(correlation.mutualInformationCorrected).toBeLessThan(0.1)
    expect(correlation.verdict).toBe('joint')
    const warning = correlation.warnings.find(({ code }) => code === 'BASINS_BEYOND_PRODUCT')
    expect(warning?.message).toContain('depth of 0.5 kT')
    const extra = correlation.basins!.map.basins.find(({ counterpart }) => counterpart === null)
    expect(extra?.x).toBeCloseTo(0.35 + 0.027, 2)
    expect(extra?.y).toBeCloseTo(2 + 0.27, 1)
    // Analytic: 0.03, the part of it beyond the saddle included.
    expect(Math.abs((extra?.population ?? 0) - 0.03)).toBeLessThan(0.01)
    expect(extra?.deviation).toBeLessThan((extra?.depth ?? 0) / 2)
  })

  it('asks at the depth it was told', () => {
    const random = createRandom(1)
    const xEdges = edgesOf(0.3, 0.4, 30)
    const yEdges = edgesOf(1, 3, 30)
    const weights = Array.from({ length: 900 }, (_, cell) => random.poisson(cell % 30 === 15 ? 5 : 20))
    const histogram = createJointHistogram({
      kinds: ['bond', 'angle'],
      xEdges,
      yEdges,
      weights,
      content: 'count',
    })
    const basinsAt = (depth: number) =>
      correlate(histogram, { basinThreshold: { depth, deviations: 3 } }).basins!
    expect(basinsAt(0.5)).toMatchObject({ depth: 0.5, threshold: { depth: 0.5, deviations: 3 } })
    // A wall of a quarter of the density, ln 4 = 1.39 kT, parts the angle in two.
    expect(basinsAt(0.5).map.basins).toHaveLength(2)
    expect(basinsAt(1.6).map.basins).toHaveLength(1)
  })

  it('goes around the turn of a dihedral', () => {
    const turned: Draw = (random) => {
      const trans = random.uniform() < 0.6
      const a = (trans ? 5 : 1.5) + 0.4 * random.normal()
      return [a > 5 ? a - 10 : a, (trans ? -1 : 1) + 0.5 * random.normal()]
    }
    const correlation = correlationOf(turned, 20_000, [72, 60], 2, ['dihedral', 'angle'])
    // trans at ±180° is one basin, not one at each end.
    expect(correlation.basins?.map.basins).toHaveLength(2)
    expect(correlation.verdict).toBe('joint')
  })

  it('has none without a sample size or with data in too few bins', () => {
    const coarse = { kinds: ['bond', 'angle'] as const, xEdges: [0.3, 0.35, 0.4], yEdges: [1, 1.5, 2] }
    const weights = [400, 300, 200, 500]
    expect(correlate(createJointHistogram({ ...coarse, weights, content: 'count' })).basins).toBeNull()
    const { xEdges, yEdges } = correlationOf(independent, 100)
    const cells = new Float64Array((xEdges.length - 1) * (yEdges.length - 1)).fill(1)
    const density = createJointHistogram({
      kinds: ['bond', 'angle'],
      xEdges,
      yEdges,
      weights: cells,
      content: 'density',
    })
    expect(correlate(density).basins).toBeNull()
  })

  it.each([50, 200, 2000])(
    'noise of %d independent samples makes no basin that the product lacks',
    (samples) => {
      for (let seed = 1; seed <= 30; seed++) {
        const { basins, verdict } = correlationOf(independent, samples, [40, 40], seed)
        expect(basins?.mapOnly ?? 0).toBe(0)
        expect(verdict).not.toBe('joint')
      }
    },
  )
})

describe('every pair of kinds', () => {
  const kinds = ['bond', 'angle', 'dihedral'] as const
  const pairs = kinds.flatMap((one) => kinds.map((other) => [one, other] as const))
  const coupled: Draw = (random) => {
    const x = random.normal()
    return [x, 0.8 * x + 0.6 * random.normal()]
  }

  it.each(pairs)(
    '%s with %s: a coupling is found, and coefficients only where they mean something',
    (...pair) => {
      const correlation = correlationOf(coupled, 4000, [40, 40], 1, pair)
      expect(correlation.kinds).toEqual(pair)
      expect(correlation.verdict).toBe('joint')
      // Analytic: −½ ln(1 − 0.8²) = 0.511 nats, less what bins of a quarter deviation lose.
      expect(Math.abs((correlation.mutualInformationCorrected ?? 0) - 0.511)).toBeLessThan(0.06)
      const codes = correlation.warnings.map(({ code }) => code)
      if (pair.includes('dihedral')) {
        expect([correlation.pearson, correlation.spearman]).toEqual([null, null])
        expect(codes).toContain('CIRCULAR_COEFFICIENT')
      } else {
        expect(correlation.pearson).toBeCloseTo(0.8, 1)
        expect(codes).not.toContain('CIRCULAR_COEFFICIENT')
      }
      expect(correlation.conditionalMean.every(({ mean }) => Number.isFinite(mean))).toBe(true)
      expect(correlation.basins?.mapOnly).toBe(0)
      const separable = correlationOf(independent, 4000, [40, 40], 1, pair)
      expect(separable.verdict).toBe('separable')
    },
  )
})
