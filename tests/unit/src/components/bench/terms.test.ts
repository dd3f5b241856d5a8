import { describe, expect, it } from 'vitest'
import { siteSentence, termBeads } from '@/components/bench/term-beads'
import { railOrder, standingCounts, termGroups } from '@/components/bench/term-groups'
import { mappingDocument, term } from './bench-terms'

const terms = [
  term('angle', 'BEH', { standing: 'inverted' }),
  term('bond', 'BB', { standing: 'inverted' }),
  term('bond', 'BE'),
  term('angle', 'BBE', { standing: 'no data' }),
]

describe('termGroups', () => {
  it('puts bonds before angles and leaves out a kind without terms', () => {
    expect(termGroups(terms).map(({ title }) => title)).toEqual(['Bonds', 'Angles'])
    expect(railOrder(terms).map(({ name }) => name)).toEqual(['B–B', 'B–E', 'B–E–H', 'B–B–E'])
  })
})

describe('standingCounts', () => {
  it('counts the standings that occur, furthest first', () => {
    expect(standingCounts(terms)).toEqual([
      { standing: 'inverted', count: 2 },
      { standing: 'data', count: 1 },
      { standing: 'no data', count: 1 },
    ])
    expect(standingCounts([terms[0]])).toEqual([{ standing: 'inverted', count: 1 }])
  })
})

describe('termBeads', () => {
  it('gives letters and colours in the order of the term', () => {
    expect(
      termBeads(term('angle', 'BEH'), mappingDocument).map(({ name, colour }) => [name, colour]),
    ).toEqual([
      ['B', 0],
      ['E', 1],
      ['H', 2],
    ])
  })

  it('shows a bead that is gone from the mapping by its type, without a colour', () => {
    const gone = termBeads(term('bond', 'BE'), { version: 1, beads: [mappingDocument.beads[0]] })
    expect(gone[1]).toEqual({ name: 'E', colour: null, site: null })
  })
})

describe('siteSentence', () => {
  it('names the rule all sites share, and says when they differ', () => {
    const beads = termBeads(term('bond', 'BE'), mappingDocument)
    expect(siteSentence(beads)).toBe('Sites at centres of mass')
    expect(siteSentence([beads[0], { ...beads[1], site: 'atom' }])).toBe('Sites by different rules')
  })
})
