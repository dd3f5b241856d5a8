import { describe, expect, it } from 'vitest'
import { type CoordinateKind, histogramDeviation } from '@shared/histogram'

/** Bin edges of equal width. */
const grid = (low: number, high: number, bins: number): Float64Array =>
  Float64Array.from({ length: bins + 1 }, (_, edge) => low + ((high - low) * edge) / bins)

/** A Gaussian of this width about a centre, at the middles of bins. */
const gaussian = (edges: Float64Array, centre: number, width: number): Float64Array =>
  edges.slice(1).map((high, bin) => Math.exp(-0.5 * (((edges[bin] + high) / 2 - centre) / width) ** 2))

const deviation = (kind: CoordinateKind, edges: Float64Array, weights: Float64Array): number =>
  histogramDeviation({ kind, edges, weights })

describe('the width of a histogram', () => {
  it('is that of a Gaussian, and of an even spread over one bin (analytic)', () => {
    const edges = grid(0.2, 0.4, 400)
    // Each bin adds its own width² / 12: a 40th of σ wide, it adds 3·10⁻⁵ of σ.
    expect(deviation('bond', edges, gaussian(edges, 0.3, 0.02)) / 0.02).toBeCloseTo(1, 4)
    expect(deviation('angle', Float64Array.of(1, 2), Float64Array.of(7))).toBeCloseTo(Math.sqrt(1 / 12), 12)
  })

  it('does not depend on what the counts sum up to', () => {
    const edges = grid(1, 3, 50)
    const weights = gaussian(edges, 2, 0.3)
    expect(
      deviation(
        'angle',
        edges,
        weights.map((weight) => 1e6 * weight),
      ),
    ).toBeCloseTo(deviation('angle', edges, weights), 12)
  })

  it('does not depend on where a dihedral stands on the circle', () => {
    const edges = grid(-Math.PI, Math.PI, 360)
    const inside = gaussian(edges, 0, 0.2)
    const turned = inside.map((_, bin) => inside[(bin + 180) % 360])
    // √(−2 ln e^(−σ²/2)) = σ for a wrapped Gaussian, and a bin of one degree adds its width² / 12 to σ².
    const expected = Math.sqrt(0.2 ** 2 + (Math.PI / 180) ** 2 / 12)
    expect(deviation('dihedral', edges, inside)).toBeCloseTo(expected, 8)
    expect(deviation('dihedral', edges, turned)).toBeCloseTo(deviation('dihedral', edges, inside), 10)
  })

  it('has no bound for a dihedral that prefers no direction', () => {
    const edges = grid(-Math.PI, Math.PI, 72)
    // Rounding leaves a mean direction of some 10⁻¹⁷: √(2 · 39) is about 8.8 rad, beyond any width with a meaning.
    expect(deviation('dihedral', edges, new Float64Array(72).fill(3))).toBeGreaterThan(8)
  })
})
