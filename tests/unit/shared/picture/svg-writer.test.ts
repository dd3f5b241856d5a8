import { describe, expect, it } from 'vitest'
import { italic, svgElement, svgEscape, svgNumber, svgPath } from '@shared/picture'

describe('svgElement', () => {
  it('writes attributes and content, and closes an empty element at once', () => {
    expect(svgElement('g', { id: 'a' }, svgElement('rect', { width: 2, height: null }))).toBe(
      '<g id="a"><rect width="2"/></g>',
    )
    expect(svgPath('M0 0', { stroke: '#000' })).toBe('<path d="M0 0" fill="none" stroke="#000"/>')
  })

  it('escapes attributes, so that a name cannot break out of one', () => {
    expect(svgElement('g', { id: '"><script>' })).toBe('<g id="&quot;&gt;&lt;script&gt;"/>')
  })
})

describe('svgEscape', () => {
  it('keeps names people gave as text', () => {
    expect(svgEscape('A<b>&"c"')).toBe('A&lt;b&gt;&amp;&quot;c&quot;')
    expect(italic('<θ>')).toBe('<tspan font-style="italic">&lt;θ&gt;</tspan>')
  })

  it('leaves out what XML cannot hold, and keeps letters of any script', () => {
    expect(svgEscape('a\u0000\u0007b\u{1F9EA}\uD800c\uFFFF')).toBe('ab\u{1F9EA}c')
  })
})

describe('svgNumber', () => {
  it('writes a hundredth of a pixel and no minus zero', () => {
    expect([svgNumber(1.23456), svgNumber(2), svgNumber(-0.001)]).toEqual(['1.23', '2', '0'])
  })
})
