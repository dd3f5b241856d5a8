import { describe, expect, it } from 'vitest'
import { drawRepeatUnit } from '@/components/polymer/draw-repeat-unit'

describe('drawRepeatUnit', () => {
  it('draws in the theme’s own variables, so that a change of theme needs no new drawing', async () => {
    const { svg } = await drawRepeatUnit('*CC(*)C(=O)OCCCCCC')
    expect(svg.querySelectorAll('line').length).toBeGreaterThan(8)
    const colours = [...svg.querySelectorAll('[stroke], [stop-color]')].flatMap((each) => [
      each.getAttribute('stroke') ?? each.getAttribute('stop-color') ?? '',
    ])
    expect(colours.length).toBeGreaterThan(0)
    expect(colours.filter((colour) => !/^(var\(--\w+\)|url\(|none)/.test(colour))).toEqual([])
  })

  it('replaces the two * by brackets and the n of a repeat unit', async () => {
    const { svg } = await drawRepeatUnit('*CC(*)c1ccccc1')
    const letters = [...svg.querySelectorAll('text')].map((text) => text.textContent.trim())
    expect(letters).not.toContain('*')
    expect(letters).toContain('n')
    expect(svg.querySelectorAll('path[d*="V"]')).toHaveLength(2)
  })

  it('brings no style sheet that would reach the rest of the page', async () => {
    const { svg } = await drawRepeatUnit('*CC(*)C(=O)OC')
    expect(svg.querySelector('style')).toBeNull()
    expect(svg.querySelector('.element, .sub')).toBeNull()
  })

  it('fits its view box to the unit, wide for a long one', async () => {
    const long = await drawRepeatUnit('*OCCCCCCCCCCCCOC(=O)c1ccc(cc1)C(*)=O')
    expect(long.width / long.height).toBeGreaterThan(2)
    expect(long.svg.getAttribute('viewBox')?.split(' ').slice(2).map(Number)).toEqual([
      long.width,
      long.height,
    ])
  })

  it('refuses what cannot be read', async () => {
    await expect(drawRepeatUnit('*CC(')).rejects.toThrow()
  })
})
