import { describe, expect, it } from 'vitest'
import { createHistogram } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert } from '@shared/inversion'
import { derivedSilhouette, measuredSilhouette } from '../../../../server/services/silhouette'

const edgesOf = (low: number, high: number, bins: number): number[] =>
  Array.from({ length: bins + 1 }, (_, edge) => low + ((high - low) * edge) / bins)

const gaussian = (edges: readonly number[], centre: number, width: number): number[] =>
  edges.slice(1).map((edge, bin) => 1e4 * Math.exp(-0.5 * (((edge + edges[bin]) / 2 - centre) / width) ** 2))

describe('measuredSilhouette', () => {
  it('has its peak where the density has it, whatever the number of bins', () => {
    for (const bins of [60, 400, 5000]) {
      const edges = edgesOf(0.2, 0.6, bins)
      const weights = gaussian(edges, 0.4, 0.04)
      const outline = measuredSilhouette(createHistogram({ kind: 'bond', edges, weights, content: 'count' }))
      expect(outline).toHaveLength(40)
      expect(Math.max(...outline)).toBe(1)
      expect([19, 20]).toContain(outline.indexOf(1))
    }
  })

  it('is one flat line for equal densities in unequal bins', () => {
    const edges = [-Math.PI, -2, -1.9, 0, 0.3, 2, Math.PI]
    const weights = edges.slice(1).map((edge, bin) => edge - edges[bin])
    const histogram = createHistogram({ kind: 'dihedral', edges, weights, content: 'probability' })
    for (const value of measuredSilhouette(histogram)) expect(value).toBe(1)
  })
})

describe('derivedSilhouette', () => {
  it('lies over the measured outline when the potential fits the distribution', () => {
    const edges = edgesOf(0.2, 0.6, 200)
    const weights = gaussian(edges, 0.35, 0.02)
    const histogram = createHistogram({ kind: 'bond', edges, weights, content: 'count' })
    const { regenerated } = invert(histogram, 300, DEFAULT_INVERSION_SETTINGS)
    const measured = measuredSilhouette(histogram)
    const derived = derivedSilhouette(regenerated, histogram)
    expect(derived).toHaveLength(40)
    // Two hundredths of the peak are a third of a pixel in the rail.
    derived.forEach((value, point) => expect(Math.abs(value - measured[point])).toBeLessThan(0.02))
  })
})
