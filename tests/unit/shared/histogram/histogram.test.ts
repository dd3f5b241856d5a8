import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { InvalidInputError, type InvalidInputCode } from '@shared/errors'
import {
  accumulate,
  binCentroids,
  binMidpoints,
  binVolumes,
  createHistogram,
  createJointHistogram,
  foldDihedral,
  rebin,
  sampleEdges,
} from '@shared/histogram'
import { edgesOf } from '../../../support/exact-histograms'

function codeOf(work: () => unknown): InvalidInputCode | null {
  try {
    work()
    return null
  } catch (error) {
    if (error instanceof InvalidInputError) return error.code
    throw error
  }
}

describe('bin volumes', () => {
  it('are the exact integrals of the Jacobian', () => {
    expect([...binVolumes('bond', Float64Array.of(0, 1, 2))]).toEqual([1 / 3, 7 / 3])
    expect([...binVolumes('dihedral', Float64Array.of(-1, 0, 2))]).toEqual([1, 2])
    const angle = binVolumes('angle', Float64Array.of(0, Math.PI / 2, Math.PI))
    angle.forEach((volume) => expect(volume).toBeCloseTo(1, 15))
  })

  it('are the widths with the Jacobian off', () => {
    expect([...binVolumes('bond', Float64Array.of(0.5, 1, 2), false)]).toEqual([0.5, 1])
  })

  it('add up to the volume of the whole range, however it is cut', () => {
    const cuts = fc.uniqueArray(fc.double({ min: 0.01, max: 3.1, noNaN: true }), {
      minLength: 2,
      maxLength: 30,
    })
    fc.assert(
      fc.property(cuts, (points) => {
        const edges = Float64Array.from(points).sort()
        const sum = binVolumes('angle', edges).reduce((all, volume) => all + volume, 0)
        expect(sum).toBeCloseTo(Math.cos(edges[0]) - Math.cos(edges[edges.length - 1]), 12)
      }),
    )
  })

  it('keep their digits in thin shells far out', () => {
    const [volume] = binVolumes('bond', Float64Array.of(1e3, 1e3 + 1e-6))
    expect(volume / ((1e3 + 5e-7) ** 2 * (1e3 + 1e-6 - 1e3))).toBeCloseTo(1, 9)
  })
})

describe('bin centroids', () => {
  it('lie inside their bins, beyond the middle where the Jacobian rises and before it where it falls', () => {
    const edges = Float64Array.from(edgesOf(0, Math.PI, 18))
    const [centroids, midpoints] = [binCentroids('angle', edges), binMidpoints(edges)]
    centroids.forEach((centroid, bin) => {
      expect(centroid).toBeGreaterThan(edges[bin])
      expect(centroid).toBeLessThan(edges[bin + 1])
      if (bin < 9) expect(centroid).toBeGreaterThan(midpoints[bin])
      else expect(centroid).toBeLessThan(midpoints[bin])
    })
  })
})

describe('a histogram', () => {
  const edges = [0.2, 0.3, 0.5]

  it('keeps counts and turns a density into masses', () => {
    expect([...createHistogram({ kind: 'bond', edges, weights: [3, 5], content: 'count' }).weights]).toEqual([
      3, 5,
    ])
    const { weights } = createHistogram({ kind: 'bond', edges, weights: [2, 1], content: 'density' })
    expect(weights[0]).toBeCloseTo(0.5, 12)
    expect(weights[1]).toBeCloseTo(0.5, 12)
  })

  it.each<[string, Parameters<typeof createHistogram>[0], InvalidInputCode]>([
    [
      'edges that do not ascend',
      { kind: 'bond', edges: [0.3, 0.2], weights: [1], content: 'count' },
      'EDGES_NOT_ASCENDING',
    ],
    [
      'a bond below zero',
      { kind: 'bond', edges: [-0.1, 0.2], weights: [1], content: 'count' },
      'EDGE_NEGATIVE',
    ],
    [
      'an angle beyond 180°',
      { kind: 'angle', edges: [3, 3.3], weights: [1], content: 'count' },
      'EDGE_OUT_OF_RANGE',
    ],
    ['one value too few', { kind: 'bond', edges, weights: [1], content: 'count' }, 'LENGTH_MISMATCH'],
    ['a negative count', { kind: 'bond', edges, weights: [1, -1], content: 'count' }, 'COUNT_NEGATIVE'],
    [
      'a value that is no number',
      { kind: 'bond', edges, weights: [1, NaN], content: 'count' },
      'NUMBER_NOT_FINITE',
    ],
    ['nothing at all', { kind: 'bond', edges, weights: [0, 0], content: 'count' }, 'TOO_FEW_SAMPLES'],
    [
      'more independent samples than counts',
      { kind: 'bond', edges, weights: [1, 2], content: 'count', independentSamples: 4 },
      'SETTING_INVALID',
    ],
  ])('refuses %s', (_, input, code) => {
    expect(codeOf(() => createHistogram(input))).toBe(code)
  })

  it('merges neighbouring bins without losing a count', () => {
    const fine = createHistogram({
      kind: 'dihedral',
      edges: edgesOf(-Math.PI, Math.PI, 72),
      weights: Array.from({ length: 72 }, (_, bin) => bin),
      content: 'count',
    })
    const coarse = rebin(fine, 4)
    expect(coarse.edges).toHaveLength(19)
    expect(coarse.weights[0]).toBe(0 + 1 + 2 + 3)
    expect(coarse.weights.reduce((sum, weight) => sum + weight, 0)).toBe((72 * 71) / 2)
  })
})

describe('samples', () => {
  it('on an edge belong to the bin above it, on the last edge to the last bin', () => {
    expect([...accumulate([0, 1, 1.5, 2], Float64Array.of(0, 1, 2))]).toEqual([1, 3])
  })

  it('get bins never wider than a fifth of their spread for a bond, 2° for an angle, 5° for a dihedral', () => {
    const spread = Array.from({ length: 40 }, (_, index) => 0.3 + 0.001 * index)
    const widest = (edges: Float64Array) => Math.max(...edges.slice(1).map((edge, bin) => edge - edges[bin]))
    const mean = spread.reduce((sum, value) => sum + value, 0) / spread.length
    const sigma = Math.sqrt(spread.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (spread.length - 1))
    expect(widest(sampleEdges('bond', spread))).toBeLessThanOrEqual(sigma / 5 + 1e-12)
    const angles = spread.map((value) => 1 + 30 * (value - 0.3))
    expect(widest(sampleEdges('angle', angles))).toBeLessThanOrEqual((2 * Math.PI) / 180 + 1e-12)
    expect(widest(sampleEdges('dihedral', angles))).toBeLessThanOrEqual((5 * Math.PI) / 180 + 1e-12)
  })

  it('of a dihedral fold into [−π, π), where +180° is −180°', () => {
    expect(foldDihedral(Math.PI)).toBe(-Math.PI)
    fc.assert(
      fc.property(fc.double({ min: -20, max: 20, noNaN: true }), (angle) => {
        const folded = foldDihedral(angle)
        expect(folded).toBeGreaterThanOrEqual(-Math.PI)
        expect(folded).toBeLessThan(Math.PI)
        expect(Math.cos(folded)).toBeCloseTo(Math.cos(angle), 9)
      }),
    )
  })
})

describe('a joint histogram', () => {
  it('turns a density per area into masses with sum 1', () => {
    const { weights } = createJointHistogram({
      kinds: ['bond', 'angle'],
      xEdges: [0.2, 0.3, 0.5],
      yEdges: [1, 2],
      weights: [2, 1],
      content: 'density',
    })
    expect(weights[0]).toBeCloseTo(0.5, 12)
    expect(weights[0] + weights[1]).toBeCloseTo(1, 12)
  })

  it('wants one value per cell', () => {
    const input = {
      kinds: ['bond', 'angle'],
      xEdges: [0.2, 0.3],
      yEdges: [1, 2, 3],
      content: 'count',
    } as const
    expect(codeOf(() => createJointHistogram({ ...input, weights: [1] }))).toBe('LENGTH_MISMATCH')
  })
})
