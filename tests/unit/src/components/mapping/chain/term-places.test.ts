import { describe, expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import { deriveTerms, type DerivedTerm } from '@shared/mapping'
import { chainLayout } from '@/components/mapping/chain/chain-layout'
import { placesPhrase } from '@/components/mapping/chain/places-phrase'
import { termPlaces } from '@/components/mapping/chain/term-places'
import { HEXYL_ACRYLATE, THREE_TO_ONE } from '../../../../shared/mapping/hexyl-acrylate'

const unit = await parseRepeatUnit(HEXYL_ACRYLATE)
const layout = chainLayout(unit, THREE_TO_ONE, { width: 680, height: 134 })
const terms = deriveTerms(unit, THREE_TO_ONE)
const named = (name: string): DerivedTerm => terms.find((term) => term.name === name) as DerivedTerm
const places = (name: string) => termPlaces(named(name), layout, unit, THREE_TO_ONE)
const at = (bead: string, index: number): { x: number; y: number } => {
  const found = layout.beads.find((each) => each.bead === bead && each.unit === index)
  return { x: found?.x as number, y: found?.y as number }
}

describe('termPlaces', () => {
  it('puts both places of B–B–E about the middle unit', () => {
    const { rows } = places('B–B–E')
    const middle = [at('b', 1), at('e', 1)]
    expect(rows).toHaveLength(2)
    expect(rows).toContainEqual([at('b', 0), ...middle])
    expect(rows).toContainEqual([at('b', 2), ...middle])
  })

  it('tells the two places of B–B–E apart by the end of the bead they are reached by', () => {
    const { notes } = places('B–B–E')
    const ordered = notes.toSorted((one, other) => one.x - other.x)
    expect(ordered.map(({ text }) => text)).toEqual(['by its CH2', 'by its CH'])
    expect(ordered[0].x).toBeCloseTo((at('b', 0).x + at('b', 1).x) / 2, 9)
  })

  it('has no notes at a term whose places do not differ', () => {
    expect(places('B–B').notes).toEqual([])
    expect(places('B–E–H').notes).toEqual([])
  })

  it('starts with the first unit where four units are needed, and says so in words', () => {
    const { rows } = places('B–B–B–B')
    expect(rows[0][0]).toEqual(at('b', 0))
    expect(rows[0][3].x).toBeCloseTo(at('b', 2).x + layout.unitWidth, 9)
    expect(placesPhrase(named('B–B–B–B'))).toBe('B–B–B–B on the chain, over four units')
  })
})

describe('placesPhrase', () => {
  it('counts places only where they differ', () => {
    expect(placesPhrase(named('B–B–E'))).toBe('B–B–E at its two places')
    expect(placesPhrase(named('B–E'))).toBe('B–E on the chain')
  })
})
