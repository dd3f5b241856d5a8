import { describe, expect, it } from 'vitest'
import { svgDocument } from '@shared/picture'

const picture = { width: 20, height: 10, title: 'A & B', body: '<g/>' }

describe('svgDocument', () => {
  it('stands alone: size, title, ground, fonts with fallbacks', () => {
    const svg = svgDocument(picture)
    expect(svg).toMatch(
      /^<svg xmlns="http:\/\/www.w3.org\/2000\/svg" width="20" height="10" viewBox="0 0 20 10"/,
    )
    expect(svg).toContain('<title>A &amp; B</title>')
    expect(svg).toContain('<rect width="20" height="10" fill="#F8F5EE"/>')
    expect(svg).toMatch(/font-family="'Fira Sans', .*, sans-serif"/)
    expect(svg).not.toContain('<style')
  })

  it('takes rules for whoever draws it at once', () => {
    expect(svgDocument(picture, "@font-face{font-family:'F'}")).toContain(
      "<style>@font-face{font-family:'F'}</style>",
    )
  })
})
