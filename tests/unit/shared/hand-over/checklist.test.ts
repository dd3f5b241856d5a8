import { describe, expect, it } from 'vitest'
import {
  type ChecklistFacts,
  type ChecklistPair,
  type ChecklistTerm,
  handOverChecklist,
  MAPPING_CHANGED,
} from '@shared/hand-over'

const term = (id: string, changes: Partial<ChecklistTerm> = {}): ChecklistTerm => ({
  id,
  name: id,
  state: 'covered',
  reason: '',
  warnings: [],
  ...changes,
})
const pair = (first: string, second: string, changes: Partial<ChecklistPair> = {}): ChecklistPair => ({
  firstTermId: first,
  secondTermId: second,
  name: `${first} with ${second}`,
  verdict: 'separable',
  decision: null,
  together: false,
  refused: null,
  warnings: [],
  ...changes,
})
const open = (facts: Partial<ChecklistFacts>) => {
  const all = {
    terms: [term('a'), term('b'), term('c')],
    pairs: [],
    unexamined: 0,
    layout: 'Three columns',
    ...facts,
  }
  return handOverChecklist(all)
    .filter(({ met }) => !met)
    .map(({ code, lines }) => ({ code, places: lines.filter((line) => line.open).map(({ place }) => place) }))
}

describe('handOverChecklist', () => {
  it('has nothing open where every term has a table without doubts', () => {
    expect(open({})).toEqual([])
  })

  it('asks for data where there are none, and for the bench where data wait', () => {
    const terms = [
      term('a', { state: 'no data' }),
      term('b', { state: 'not inverted' }),
      term('c', { state: 'stale' }),
    ]
    expect(open({ terms })).toEqual([
      {
        code: 'TERMS_COVERED',
        places: [
          { room: 'intake', termId: 'a' },
          { room: 'bench', termId: 'b' },
          { room: 'bench', termId: 'c' },
        ],
      },
    ])
  })

  it('takes a term that is left out with its reason, but not a hand-over of nothing', () => {
    const out = term('a', { state: 'left out', reason: 'flat' })
    expect(open({ terms: [out, term('b')] })).toEqual([])
    expect(open({ terms: [out] })).toMatchObject([{ code: 'TERMS_COVERED' }])
  })

  it('asks for no single table of a term whose energy is in a joint one, nor for answers to its warnings', () => {
    const terms = [
      term('a', { state: 'not inverted' }),
      term('b', { warnings: [{ code: 'FEW_SAMPLES', answered: false }] }),
    ]
    expect(
      open({ terms, pairs: [pair('a', 'b', { verdict: 'joint', decision: 'joint', together: true })] }),
    ).toEqual([])
  })

  it('asks for a decision unless the verdict is separable', () => {
    for (const verdict of ['borderline', 'joint', 'undecided'] as const) {
      expect(open({ pairs: [pair('a', 'b', { verdict })] })).toEqual([
        { code: 'VERDICTS_RECORDED', places: [{ room: 'correlation', firstTermId: 'a', secondTermId: 'b' }] },
      ])
      expect(open({ pairs: [pair('a', 'b', { verdict, decision: 'separate' })] })).toEqual([])
    }
    expect(open({ pairs: [pair('a', 'b')] })).toEqual([])
  })

  it('is not met by the decision to change the mapping, by a refused joint table, or by a term in two joint tables', () => {
    const joint = { verdict: 'joint', decision: 'joint', together: true } as const
    for (const pairs of [
      [pair('a', 'b', { decision: 'change mapping' })],
      [pair('a', 'b', { ...joint, refused: 'too few' })],
      [pair('a', 'b', joint), pair('b', 'c', joint)],
    ]) {
      expect(open({ pairs })).toMatchObject([{ code: 'VERDICTS_RECORDED' }])
    }
  })

  it('asks for an answer to each warning of a table that goes out', () => {
    const warnings = [
      { code: 'FEW_SAMPLES', answered: false },
      { code: 'DATA_AT_EDGE', answered: true },
    ]
    expect(open({ terms: [term('a', { warnings }), term('b')] })).toEqual([
      { code: 'WARNINGS_ANSWERED', places: [{ room: 'bench', termId: 'a' }] },
    ])
    const joint = { verdict: 'joint', decision: 'joint', together: true, warnings } as const
    expect(open({ pairs: [pair('a', 'b', joint)] })).toMatchObject([{ code: 'WARNINGS_ANSWERED' }])
  })

  it('keeps data of an earlier version of the mapping as a point of its own', () => {
    const terms = [term('a', { warnings: [{ code: MAPPING_CHANGED, answered: false }] })]
    expect(open({ terms })).toMatchObject([{ code: 'DATA_FIT_MAPPING' }])
    expect(open({ terms: [term('a', { warnings: [{ code: MAPPING_CHANGED, answered: true }] })] })).toEqual(
      [],
    )
  })

  it('asks for another layout where the one chosen is gone', () => {
    expect(open({ layout: null })).toEqual([{ code: 'LAYOUT_STATED', places: [{ room: 'layout' }] }])
  })

  it('is not held up by pairs nobody measured, but says how many there are', () => {
    const [, verdicts] = handOverChecklist({ terms: [term('a')], pairs: [], unexamined: 3, layout: 'x' })
    expect(verdicts).toMatchObject({ met: true, lines: [{ open: false }] })
    expect(verdicts.lines[0].text).toContain('3 pairs')
  })
})
