import { chemicalNameParts } from '../chemistry/chemical-name'

/** A piece of text that is set in one way. */
export interface TextRun {
  readonly text: string
  readonly style: 'plain' | 'italic' | 'lowered'
}

/**
 * Symbols of quantities where they stand alone: kT; dU, dq; U, V, k, n, p, q, r, g, N, w, C, μ and the Greek coordinates, with a number as
 * their index. Letters within words, names of terms (B–E) and units (g/mol) are none.
 */
const SYMBOL =
  /(?<![\p{L}\p{N}–·-])(?:(kT)(?![\p{L}\p{Nd}])|(d)([Uqxy])(?![\p{L}\p{Nd}])|([UVknpqrNwCDbxyJ])(min|\d{1,2})?(?![\p{L}\p{Nd}–·-])|(g)(?![\p{L}\p{Nd}–·/-]))|(?<![\p{L}–·-])([θφψδλσμπη])(\d{1,2})?(?![\p{L}\p{Nd}–·-])/gu

/** A sentence with its symbols in italics and their indices lowered. */
export function sentenceRuns(text: string): TextRun[] {
  const runs: TextRun[] = []
  let end = 0
  for (const match of text.matchAll(SYMBOL)) {
    const [whole, kT, d = '', differential, letter, index, g, greek, greekIndex] = match
    runs.push({ text: text.slice(end, match.index) + d, style: 'plain' })
    runs.push({ text: kT ?? differential ?? letter ?? g ?? greek, style: 'italic' })
    const lowered = index ?? greekIndex
    if (lowered !== undefined) runs.push({ text: lowered, style: 'lowered' })
    end = match.index + whole.length
  }
  runs.push({ text: text.slice(end), style: 'plain' })
  return runs.filter((run) => run.text !== '')
}

/** A chemical formula with its counts lowered. */
export function formulaRuns(formula: string): TextRun[] {
  return (formula.match(/[\d.]+|[^\d.]+/g) ?? []).map((text) => ({
    text,
    style: /\d/.test(text) ? 'lowered' : 'plain',
  }))
}

/** A chemical name with its locants in italics. */
export function nameRuns(name: string): TextRun[] {
  return chemicalNameParts(name).map(({ text, italic }) => ({ text, style: italic ? 'italic' : 'plain' }))
}
