import { describe, expect, it } from 'vitest'
import { formulaRuns, nameRuns, sentenceRuns, type TextRun } from '@shared/data-sheet'

const marked = (runs: readonly TextRun[]): string =>
  runs
    .map(({ text, style }) => (style === 'italic' ? `*${text}*` : style === 'lowered' ? `_${text}_` : text))
    .join('')

describe('text of a data sheet', () => {
  it('has symbols in italics and their indices lowered', () => {
    expect(marked(sentenceRuns('U = ½ k (r − r0)² in kT'))).toBe('*U* = ½ *k* (*r* − *r*_0_)² in *kT*')
    expect(marked(sentenceRuns('k2 (1 + cos 2φ), θ0²'))).toBe('*k*_2_ (1 + cos 2*φ*), *θ*_0_²')
    expect(marked(sentenceRuns('−kT ln(p/V)'))).toBe('−*kT* ln(*p*/*V*)')
  })

  it('keeps the d of a derivative upright', () => {
    expect(marked(sentenceRuns('−dU/dq'))).toBe('−d*U*/d*q*')
  })

  it('leaves names of terms, units and words alone', () => {
    const text = 'C–U–N and U1–k in kJ/mol/nm², g/mol; a number n-th'
    expect(marked(sentenceRuns(text))).toBe(text)
  })

  it('gives back the same letters', () => {
    const text = 'U(x, y) = −kT ln(p/V) with λ at 180° for B–E–H'
    expect(
      sentenceRuns(text)
        .map((run) => run.text)
        .join(''),
    ).toBe(text)
  })

  it('lowers the counts of a formula and slants the locants of a name', () => {
    expect(marked(formulaRuns('C9H16O2'))).toBe('C_9_H_16_O_2_')
    expect(marked(nameRuns('poly(n-hexyl acrylate)'))).toBe('poly(*n*-hexyl acrylate)')
  })
})
