import { describe, expect, it } from 'vitest'
import type { DerivedTerm, MappingDocument } from '@shared/mapping'
import { matchTerms, type StoredTerm } from '../../../../server/services/match-terms'

/** A document by its beads, as in { b1: 'A', b2: 'B' }. */
const documentOf = (types: Readonly<Record<string, string>>): MappingDocument => ({
  version: 1,
  beads: Object.entries(types).map(([id, type]) => ({
    id,
    type,
    name: id,
    label: '',
    colour: 0,
    site: { rule: 'mass' },
    atoms: [],
  })),
})

const stored = (id: string, types: string, current = true): StoredTerm => ({
  id,
  kind: types.split('-').length === 2 ? 'bond' : 'angle',
  types: types.split('-'),
  placeKey: '',
  current,
})

const derived = (types: string): DerivedTerm => ({
  kind: types.split('-').length === 2 ? 'bond' : 'angle',
  types: types.split('-'),
  name: types,
  places: [],
  placeClasses: [],
  placeKey: '',
})

/** What becomes of each stored term: its new types, or vanished; and which terms are new. */
function match(
  terms: readonly StoredTerm[],
  now: readonly string[],
  before: Readonly<Record<string, string>>,
  after: Readonly<Record<string, string>>,
) {
  const changes = matchTerms(terms, now.map(derived), documentOf(before), documentOf(after))
  return {
    kept: Object.fromEntries(changes.kept.map(({ id, term }) => [id, term.name])),
    added: changes.added.map(({ name }) => name),
    vanished: changes.vanished,
  }
}

describe('matchTerms', () => {
  it('keeps terms of the same kind and sequence, adds new ones and names those that vanish', () => {
    const beads = { b1: 'A', b2: 'B' }
    const result = match([stored('1', 'A-A'), stored('2', 'A-B')], ['A-A', 'A-A-A'], beads, { b1: 'A' })
    expect(result).toEqual({ kept: { 1: 'A-A' }, added: ['A-A-A'], vanished: ['2'] })
  })

  it('takes a sequence and its reverse as one', () => {
    const beads = { b1: 'A', b2: 'B' }
    expect(match([stored('1', 'B-A')], ['A-B'], beads, beads).kept).toEqual({ 1: 'A-B' })
  })

  it('carries a type along that was renamed throughout, also where that turns the sequence around', () => {
    const result = match(
      [stored('1', 'A-A'), stored('2', 'A-B')],
      ['B-Z', 'Z-Z'],
      { b1: 'A', b2: 'B', b3: 'A' },
      { b1: 'Z', b2: 'B', b3: 'Z' },
    )
    expect(result).toEqual({ kept: { 1: 'Z-Z', 2: 'B-Z' }, added: [], vanished: [] })
  })

  it('follows the beads when two types swap their names', () => {
    const result = match(
      [stored('1', 'A-A'), stored('2', 'B-B')],
      ['A-A', 'B-B'],
      { b1: 'A', b2: 'B' },
      { b1: 'B', b2: 'A' },
    )
    expect(result).toEqual({ kept: { 1: 'B-B', 2: 'A-A' }, added: [], vanished: [] })
  })

  it('renames while a bead of the type is deleted and another one is added', () => {
    const result = match(
      [stored('1', 'A-A')],
      ['Z-Z'],
      { b1: 'A', b2: 'A', b3: 'A' },
      { b1: 'Z', b2: 'Z', b4: 'Z' },
    )
    expect(result.kept).toEqual({ 1: 'Z-Z' })
  })

  it('does not take a type that splits up for renamed', () => {
    const result = match([stored('1', 'A-A')], ['A-C', 'C-C'], { b1: 'A', b2: 'A' }, { b1: 'A', b2: 'C' })
    expect(result).toEqual({ kept: {}, added: ['A-C', 'C-C'], vanished: ['1'] })
  })

  it('does not take a type that is merged into another for renamed', () => {
    const result = match(
      [stored('1', 'A-A'), stored('2', 'B-B')],
      ['A-A'],
      { b1: 'A', b2: 'B' },
      { b1: 'A', b2: 'A' },
    )
    expect(result).toEqual({ kept: { 1: 'A-A' }, added: [], vanished: ['2'] })
  })

  it('gives a name that was freed to the beads that took it over, not to those that are gone', () => {
    const result = match([stored('1', 'A-A'), stored('2', 'B-B')], ['B-B'], { b1: 'A', b2: 'B' }, { b1: 'B' })
    expect(result).toEqual({ kept: { 1: 'B-B' }, added: [], vanished: ['2'] })
  })

  it('brings back a vanished term of the same sequence, but not in place of a current one', () => {
    const beads = { b1: 'A', b2: 'B' }
    expect(match([stored('1', 'A-B', false)], ['A-B'], { b1: 'A' }, beads).kept).toEqual({ 1: 'A-B' })
    const both = [stored('old', 'A-B', false), stored('now', 'A-B')]
    expect(match(both, ['A-B'], beads, beads)).toMatchObject({ kept: { now: 'A-B' }, vanished: ['old'] })
  })

  it('leaves vanished terms under the names they left with', () => {
    const result = match([stored('1', 'A-B', false)], ['C-C'], { b1: 'A' }, { b1: 'C' })
    expect(result).toEqual({ kept: {}, added: ['C-C'], vanished: ['1'] })
  })
})

describe('matchTerms of a sequence that is split by its places', () => {
  const beads = documentOf({ b1: 'A', b2: 'B' })
  const keys = ['b1@0 b2@0', 'b1@0 b2@1']

  it('tells its terms apart by their place, read from either end', () => {
    const both = keys.map((placeKey, index) => ({ ...stored(String(index), 'A-B'), placeKey }))
    const now = ['b2@1 b1@0', 'b2@0 b1@0'].map((placeKey) => ({ ...derived('B-A'), placeKey }))
    const { kept, added } = matchTerms(both, now, beads, beads)
    expect(kept).toEqual([
      { id: '1', term: now[0] },
      { id: '0', term: now[1] },
    ])
    expect(added).toEqual([])
  })

  it('leaves what stood on the pooled term with the pooled term', () => {
    const now = keys.map((placeKey) => ({ ...derived('A-B'), placeKey }))
    const { kept, added, vanished } = matchTerms([stored('pooled', 'A-B')], now, beads, beads)
    expect([kept, added, vanished]).toEqual([[], now, ['pooled']])
  })
})
