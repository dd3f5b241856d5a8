import { describe, expect, it } from 'vitest'
import { MAP_RAMPS } from '@/assets/map-ramps'
import { mapModel } from '@/components/correlation/figure/map-model'
import { mapPicture } from '@/components/correlation/figure/map-picture'
import type { MapView } from '@/components/correlation/figure/map-view'
import { lightTokens, svgDocument } from '@shared/picture'
import { correlationOf, correlationWithoutSampleSize, twoBasins } from '../correlations'

const units = { length: 'nm', angle: 'degree', energy: 'kJ/mol' } as const
const caption = {
  polymer: 'poly(<b>ethylene</b>)',
  mapping: '3-to-1',
  terms: 'bond A–B with angle A–B–C',
  statePoint: '400 K, melt',
  remarks: ['12 000 counts'],
  invented: true,
}
const drawn = (view: MapView, correlation = correlationOf(0.7)) =>
  svgDocument(mapPicture(correlation, mapModel(correlation, units), view, ['A–B', 'A–B–C'], caption))
/** What can be read in it, without the markup. */
const words = (svg: string) => svg.replace(/<[^>]+>/g, ' ').replace(/\s+/g, ' ')

describe('mapPicture', () => {
  it('names both axes with their units, what the colours stand for, and the caption', () => {
    const text = words(drawn('density'))
    for (const part of ['r (A–B), nm', 'θ deg', 'A–B alone', 'A–B–C alone']) expect(text).toContain(part)
    expect(text).toMatch(/density per volume, share of [\d.]+ nm⁻³, its highest value/)
    expect(text).toContain('mean θ at each r , 95 %')
    expect(text).toContain('1, 2, 3 kT above the lowest')
    expect(text).toContain('bond A–B with angle A–B–C at 400 K, melt. 12 000 counts.')
    expect(text).toContain('Invented data (demonstration).')
  })

  it('rings the basins of the map and, with dashes, those of the product only, and says so in the key', () => {
    const svg = drawn('density', twoBasins())
    expect(words(svg)).toContain('basin of the map basin of the product only')
    // Two on the map and one in the key.
    expect(svg.match(/<circle[^>]+stroke-dasharray="3 2"/g)).toHaveLength(3)
  })

  it('shows the coupling in kT about zero, without contours, thin cells stippled', () => {
    const svg = drawn('coupling')
    const text = words(svg)
    expect(text).toMatch(/coupling ln\[ p ₁₂\/\( p ₁ p ₂\)\] in kT/)
    expect(text).toContain('too thin to judge')
    expect(text).not.toContain('above the lowest')
    expect(svg).toContain('fill="url(#thin)"')
  })

  it.each(['density', 'coupling'] as const)(
    'is drawn in the light tokens and ramp (%s) and refers to nothing outside itself',
    (view) => {
      const svg = drawn(view)
      const known: readonly string[] = [...Object.values(lightTokens), ...MAP_RAMPS.light[view]]
      const colours = [...new Set(svg.match(/#[0-9A-Fa-f]{6}/g))]
      expect(colours.filter((colour) => !known.includes(colour))).toEqual([])
      expect(svg).not.toMatch(/var\(|href|<image|<script|@import|url\((?!#)|NaN|Infinity|undefined/)
      expect(svg.match(/https?:/g)).toHaveLength(1)
    },
  )

  it('keeps names people gave as text', () => {
    expect(drawn('density')).not.toContain('<b>')
  })

  it('says that there are no bars where nobody stated a sample size', () => {
    expect(words(drawn('density', correlationWithoutSampleSize(0.7)))).toContain(
      'no bars: sample size not stated',
    )
  })
})
