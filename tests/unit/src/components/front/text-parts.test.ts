import { describe, expect, it } from 'vitest'
import { textParts } from '@/components/front/text-parts'

const links = (text: string): string[] =>
  textParts(text)
    .filter(({ link }) => link)
    .map((part) => part.text)

describe('textParts', () => {
  it('finds the addresses of a text, without what ends a sentence', () => {
    expect(links('Join here:\nhttps://beads.example/join/a-b_c\n\nor (see http://x.example/y?z=1).')).toEqual(
      ['https://beads.example/join/a-b_c', 'http://x.example/y?z=1'],
    )
  })

  it('leaves nothing of the text out', () => {
    const text = 'One https://a.example/b, two javascript:alert(1) three'
    expect(
      textParts(text)
        .map((part) => part.text)
        .join(''),
    ).toBe(text)
    expect(links(text)).toEqual(['https://a.example/b'])
  })

  it('makes no link of what is no address of the web', () => {
    expect(links('javascript:alert(1) data:text/html,x file:///etc/passwd <b>')).toEqual([])
  })
})
