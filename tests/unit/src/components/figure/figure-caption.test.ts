import { describe, expect, it } from 'vitest'
import { captionSentences, captionText, type FigureCaption } from '@/components/figure/figure-caption'
import { fileNameOf } from '@/components/figure/file-name'
import { brokenLines, textWidth } from '@shared/picture'

const caption: FigureCaption = {
  polymer: 'poly(n-hexyl acrylate)',
  mapping: '3-to-1',
  terms: 'angle B–E–H',
  statePoint: '400 K, melt',
  remarks: ['6 452 independent samples'],
  invented: true,
}

describe('the caption of a figure', () => {
  it('says what it shows, where it comes from and that it is invented', () => {
    expect(captionSentences(caption)).toEqual([
      'poly(n-hexyl acrylate), 3-to-1: angle B–E–H at 400 K, melt.',
      '6 452 independent samples.',
      'Invented data (demonstration).',
    ])
    expect(captionSentences({ ...caption, invented: false }).join(' ')).not.toContain('nvented')
  })

  it('sets locants in italics and breaks into the lines it needs', () => {
    const wide = captionText(caption, 0, 0, 2000)
    const narrow = captionText(caption, 0, 0, 300)
    expect(wide.body).toContain('poly(<tspan font-style="italic">n</tspan>-hexyl')
    expect(wide.body.match(/<text/g)).toHaveLength(1)
    expect(narrow.body.match(/<text/g)!.length).toBeGreaterThan(1)
    expect(narrow.height).toBeGreaterThan(wide.height)
  })
})

describe('brokenLines', () => {
  it('keeps every word and no line wider than asked, a long word excepted', () => {
    const text = 'one two three four five incomprehensibilities six'
    const lines = brokenLines(text, 60, 12)
    expect(lines.join(' ')).toBe(text)
    for (const line of lines) expect(textWidth(line, 12) <= 60 || !line.includes(' ')).toBe(true)
  })
})

describe('textWidth', () => {
  it.each([
    ['regenerated from U', 878.9],
    ['measured', 447.4],
    ['without sin θ', 591.2],
    ['U, 95 % band', 585.1],
    ['Residual: (n − expected)/√expected of the independent samples', 2904.2],
  ])('comes within 5 %% of what a browser measures for %j', (text, measured) => {
    // Chromium with Fira Sans at 100 px.
    expect(Math.abs(textWidth(text, 100) / measured - 1)).toBeLessThan(0.05)
  })
})

describe('fileNameOf', () => {
  it('keeps what every system can write', () => {
    expect(fileNameOf('poly(n-hexyl acrylate)', '3-to-1', 'angle', 'B–E–H', '400K')).toBe(
      'poly-n-hexyl-acrylate_3-to-1_angle_B-E-H_400K',
    )
    expect(fileNameOf('../..', 'é')).toBe('unnamed_e')
  })
})
