import { describe, expect, it } from 'vitest'
import type { CoordinateKind } from '@shared/units'
import { benchPicture } from '@/components/bench/figure/bench-picture'
import { figureModel } from '@/components/bench/figure/figure-model'
import { CURVES, type VisibleCurves } from '@/components/bench/figure/visible-curves'
import type { DisplayUnits } from '@/components/figure/coordinate-names'
import { lightTokens, svgDocument } from '@shared/picture'
import { angleCounts, bondCounts, dihedralCounts, inverted, withoutSampleSize } from '../distributions'

const units: DisplayUnits = { length: 'nm', angle: 'degree', energy: 'kJ/mol' }
const all = Object.fromEntries(CURVES.map((curve) => [curve, true])) as Record<keyof VisibleCurves, boolean>
const caption = {
  polymer: 'poly(<b>ethylene</b>)',
  mapping: '3-to-1',
  terms: 'angle B–E–H',
  statePoint: '400 K, melt',
  remarks: ['200 000 counts'],
  invented: true,
}
const histograms = { bond: bondCounts, angle: angleCounts, dihedral: dihedralCounts }
const drawn = (kind: CoordinateKind, visible: VisibleCurves = all, histogram = histograms[kind]()) =>
  svgDocument(benchPicture(figureModel(inverted(histogram), units), [], visible, true, caption))
/** What can be read in it, without the markup. */
const words = (svg: string) => svg.replace(/<[^>]+>/g, ' ').replace(/\s+/g, ' ')

describe('benchPicture', () => {
  it('names quantity and unit of every axis, the key and the caption', () => {
    const text = words(drawn('angle'))
    for (const part of ['p ( θ )', '%/deg', 'U ( θ )', 'kJ/mol', 'kT', 'θ , deg', 'residual in σ']) {
      expect(text).toContain(part)
    }
    for (const part of ['measured', 'regenerated from U', 'U , 95 % band', 'bin by bin', 'without sin θ']) {
      expect(text).toContain(part)
    }
    expect(text).toContain('3-to-1: angle B–E–H at 400 K, melt. 200 000 counts.')
    expect(text).toContain('Residual: (n − expected)/√expected')
    expect(text).toContain('Invented data (demonstration).')
  })

  it('is drawn in the light tokens and refers to nothing outside itself', () => {
    const svg = drawn('bond')
    const colours = new Set(svg.match(/#[0-9A-Fa-f]{6}/g))
    expect([...colours].every((colour) => (Object.values(lightTokens) as string[]).includes(colour))).toBe(
      true,
    )
    for (const curve of ['data', 'dataEdge', 'model', 'band', 'raw', 'plain'] as const)
      expect(colours).toContain(lightTokens[curve])
    expect(svg).not.toMatch(/var\(|href|<image|<script|@import|url\((?!#)/)
    expect(svg.match(/https?:/g)).toHaveLength(1)
    expect(svg).toContain('xmlns="http://www.w3.org/2000/svg"')
  })

  it('keeps names people gave as text', () => {
    expect(drawn('angle')).not.toContain('<b>')
    expect(drawn('angle')).toContain('poly(&lt;b&gt;ethylene&lt;/b&gt;)')
  })

  it('has no number that is none', () => {
    for (const kind of ['bond', 'angle', 'dihedral'] as const)
      expect(drawn(kind)).not.toMatch(/NaN|Infinity|undefined/)
  })

  it('leaves out what the key has switched off, from the drawing and from its key', () => {
    const svg = drawn('angle', { ...all, residual: false, comparison: false })
    expect(words(svg)).not.toContain('residual')
    expect(words(svg)).not.toContain('Residual')
    expect(words(svg)).not.toContain('without')
    expect(svg).not.toContain(lightTokens.plain)
  })

  it('says why there is no band, and draws no residual, without a sample size', () => {
    const text = words(drawn('angle', all, withoutSampleSize(angleCounts())))
    expect(text).toContain('U , no band: sample size not stated')
    expect(text).not.toContain('esidual')
  })
})
