import { describe, expect, it } from 'vitest'
import { binMidpoints, binVolumes } from '@shared/histogram'
import { createRandom, mirroredCurvatures, notAKnotCurvatures } from '@shared/numeric'
import { identityBasis, penalisedFit, penalisedSystem, splineBasis } from '@shared/smoothing'
import { edgesOf } from '../../../support/exact-histograms'

/** Counts of a half, and of the whole that it makes with its mirror image at 1. */
function halves(bins: number, ragged: boolean) {
  const random = createRandom(bins)
  const widths = Array.from({ length: bins }, () => (ragged ? 0.3 + random.uniform() : 1))
  const total = widths.reduce((sum, width) => sum + width, 0)
  let sum = 0
  const edges = [0, ...widths.map((width) => (sum += width) / total)]
  edges[bins] = 1
  const counts = edges
    .slice(1)
    .map((edge, bin) => random.poisson(400 * (edge - edges[bin]) * bins * Math.exp(-8 * (edge - 0.8) ** 2)))
  const image = edges.slice(0, -1).map((edge) => 2 - edge)
  return {
    half: { edges: Float64Array.from(edges), counts: Float64Array.from(counts) },
    whole: {
      edges: Float64Array.of(...edges, ...image.toReversed()),
      counts: Float64Array.of(...counts, ...counts.toReversed()),
    },
  }
}

function fitted(
  basis: ReturnType<typeof identityBasis>,
  edges: Float64Array,
  counts: Float64Array,
  lambda: number,
) {
  return penalisedFit(
    penalisedSystem(basis),
    counts,
    binVolumes('dihedral', edges).map(Math.log),
    lambda,
    null,
  )
}

describe('a curve with a mirror', () => {
  it.each([
    [10, false],
    [60, false],
    [60, true],
  ])('of %i bins (ragged: %s) is one half of the curve of twice the bins', (bins, ragged) => {
    const { half, whole } = halves(bins, ragged)
    for (const lambda of [1e-2, 1, 1e4, 1e8]) {
      const one = fitted(identityBasis(binMidpoints(half.edges), null, 1), half.edges, half.counts, lambda)
      const both = fitted(identityBasis(binMidpoints(whole.edges), null), whole.edges, whole.counts, lambda)
      // Ragged spacings are scaled by their mean, which in the whole counts one spacing more.
      const tolerance = ragged ? 0.05 : 1e-6
      one.eta.forEach((value, bin) => expect(Math.abs(value - both.eta[bin])).toBeLessThan(tolerance))
    }
  })

  it('in B-splines is one half of the curve of twice the bins', () => {
    const { half, whole } = halves(500, false)
    for (const lambda of [1, 1e6, 1e12]) {
      const basis = splineBasis(binMidpoints(half.edges), 0, 1, false, 62, true)
      const one = fitted(basis, half.edges, half.counts, lambda)
      const full = splineBasis(binMidpoints(whole.edges), 0, 2, false, 123, false)
      const both = fitted(full, whole.edges, whole.counts, lambda)
      one.eta.forEach((value, bin) => expect(Math.abs(value - both.eta[bin])).toBeLessThan(1e-6))
    }
  })

  it('in the stiff limit is a parabola about its mirror', () => {
    const { half } = halves(60, true)
    const midpoints = binMidpoints(half.edges)
    const { eta, effectiveDimension } = fitted(
      identityBasis(midpoints, null, 1),
      half.edges,
      half.counts,
      1e13,
    )
    const scaled = (bin: number) =>
      (eta[bin] - eta[59]) / ((1 - midpoints[bin]) ** 2 - (1 - midpoints[59]) ** 2)
    for (let bin = 0; bin < 50; bin++) expect(scaled(bin) / scaled(30)).toBeCloseTo(1, 3)
    expect(effectiveDimension).toBeCloseTo(2, 3)
  })

  it('has the spline of the knots and their images', () => {
    const x = binMidpoints(Float64Array.from(edgesOf(0, 1, 20)))
    const random = createRandom(5)
    const y = x.map(() => random.normal())
    const whole = notAKnotCurvatures(
      Float64Array.of(...x, ...x.map((value) => 2 - value).toReversed()),
      Float64Array.of(...y, ...y.toReversed()),
    )
    mirroredCurvatures(x, y, 1).forEach((value, knot) => expect(value).toBeCloseTo(whole[knot], 8))
  })
})
