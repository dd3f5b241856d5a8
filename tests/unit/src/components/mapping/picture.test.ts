import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { layoutRepeatUnit, parseRepeatUnit } from '@shared/chemistry'
import { BEAD_COLOURS, shareAtom } from '@shared/mapping'
import { lightTokens, svgDocument } from '@shared/picture'
import { BEAD_INKS, boardLayout, mappingPicture } from '@shared/mapping-drawing'
import { mappingCsv } from '@/components/mapping/picture/mapping-csv'
import { HEXYL_ACRYLATE, THREE_TO_ONE } from '../../../shared/mapping/hexyl-acrylate'

const unit = await parseRepeatUnit(HEXYL_ACRYLATE)
const board = boardLayout(unit, await layoutRepeatUnit(HEXYL_ACRYLATE))
const caption = { polymer: 'poly(<n>-hexyl acrylate)', mapping: '3-to-1', invented: true }
const coloured = {
  ...THREE_TO_ONE,
  beads: THREE_TO_ONE.beads.map((bead, colour) => ({ ...bead, colour, label: `word ${colour}` })),
}

describe('the colours of beads in a picture', () => {
  it('are the light tokens of the page', () => {
    const css = readFileSync('src/assets/tokens.css', 'utf8')
    const light = /\[data-theme=light\]\{([^}]*)\}/.exec(css)?.[1] ?? ''
    for (const hue of BEAD_COLOURS) {
      const { fill, edge, halo, letter } = BEAD_INKS[hue]
      for (const token of [
        `b-${hue}:${fill}`,
        `e-${hue}:${edge}`,
        `h-${hue}:${halo}`,
        `l-${hue}:${letter}`,
      ]) {
        expect(light).toContain(`--${token};`)
      }
    }
  })
})

/** What a person reads. */
const plain = (text: string): string =>
  [...new DOMParser().parseFromString(text, 'image/svg+xml').querySelectorAll('text')]
    .map((each) => (each.textContent ?? '').replace(/\u200b/g, ''))
    .join(' ')

describe('the picture of a mapping', () => {
  const read = (document = coloured) => {
    const picture = mappingPicture(unit, board, document, caption)
    const text = svgDocument(picture)
    const parsed = new DOMParser().parseFromString(text, 'image/svg+xml')
    return { picture, text, parsed }
  }

  it('is well formed, with names that people gave escaped', () => {
    const { parsed, text } = read()
    expect(parsed.querySelector('parsererror')).toBeNull()
    expect(text).toContain('poly(&lt;n&gt;-hexyl acrylate), mapping 3-to-1')
  })

  it('has a legend that says what each bead is, and a caption', () => {
    const { text } = read()
    expect(plain(text)).toContain('E, word 1: CO2, 44.009 g/mol')
    expect(text).toContain('site of the bead')
    expect(plain(text)).toContain('3 beads for one repeat unit C9H16O2')
    expect(plain(text)).toContain('Invented (demonstration).')
  })

  it('sets the numbers of formulas lower and smaller, and comes back to the line behind them', () => {
    const { parsed } = read()
    const row = [...parsed.querySelectorAll('text')].find((each) => each.textContent?.startsWith('H, word 2'))
    const runs = [...(row?.querySelectorAll('tspan') ?? [])].map((each) => ({
      text: each.textContent,
      shift: Number(each.getAttribute('dy') ?? 0),
      small: each.hasAttribute('font-size'),
    }))
    expect(runs.map(({ text }) => text)).toEqual(['C', '6', 'H', '13', '\u200b'])
    expect(runs.map(({ small }) => small)).toEqual([false, true, false, true, false])
    const heights = runs.map((_, end) => runs.slice(0, end + 1).reduce((sum, { shift }) => sum + shift, 0))
    expect(heights).toEqual([0, 2.86, 0, 2.86, 0])
  })

  it('is drawn in light colours only, and asks for nothing from the page', () => {
    const known: readonly string[] = [
      ...Object.values(lightTokens),
      ...Object.values(BEAD_INKS).flatMap(({ fill, edge, halo, letter }) => [fill, edge, halo, letter]),
    ]
    const { text } = read()
    for (const [colour] of text.matchAll(/#[0-9A-F]{6}/gi)) expect(known).toContain(colour)
    expect(text).not.toContain('var(')
  })

  it('holds the whole drawing, and parts the disc of a shared atom', () => {
    const { picture, text } = read(shareAtom(coloured, 2, ['b', 'e']))
    expect(picture.width).toBeGreaterThan(board.box.width)
    expect(picture.height).toBeGreaterThan(board.box.height)
    expect(text.match(/A20 20 0 /g)).toHaveLength(2)
  })
})

describe('the beads as a table', () => {
  it('have a row each, with what they are made of', () => {
    const lines = mappingCsv(unit, coloured, caption).split('\r\n')
    expect(lines.slice(1, 4)).toEqual([
      '# Invented (demonstration)',
      'bead,type,word,atoms,formula,mass (g/mol),site',
      'B,B,word 0,"C1, C2",C2H3,27.046,mass',
    ])
  })
})
