import { describe, expect, it } from 'vitest'
import { parseRepeatUnit, type RepeatUnit } from '@shared/chemistry'
import { mappingDocumentSchema } from '@shared/contracts/mapping'
import {
  changeBead,
  derivePooledTerms,
  deriveTerms,
  type MappingDocument,
  type Place,
  placeFlags,
  setPooling,
  setTermUse,
  usedTerms,
} from '@shared/mapping'
import { FIVE_TO_ONE, HEXYL_ACRYLATE, THREE_TO_ONE } from './hexyl-acrylate'

const acrylate = await parseRepeatUnit(HEXYL_ACRYLATE)
const split = setPooling(THREE_TO_ONE, ['E', 'B', 'B'], 'split')
const names = (document: MappingDocument, unit: RepeatUnit = acrylate): string[] =>
  deriveTerms(unit, document).map(({ name }) => name)

describe('a sequence whose places differ', () => {
  it('is one term until the document splits it, read from either end', () => {
    expect(names(THREE_TO_ONE)).toContain('B–B–E')
    expect(names(split).filter((name) => name.startsWith('B–B–E'))).toEqual([
      'B–B–E (1)',
      'B–B–E (2)',
      'B–B–E–H',
    ])
  })

  it('keeps all its places when it is split, each in one of its terms', () => {
    const whole = deriveTerms(acrylate, THREE_TO_ONE).find(({ name }) => name === 'B–B–E')
    const parts = deriveTerms(acrylate, split).filter(({ name }) => name.startsWith('B–B–E ('))
    expect(parts.flatMap(({ places }) => places)).toHaveLength(whole?.places.length ?? NaN)
    expect(new Set(parts.map(({ placeKey }) => placeKey)).size).toBe(2)
    expect(parts.flatMap(({ placeClasses }) => placeClasses)).toEqual([0, 0])
  })

  it('is flagged whatever was decided, with the decision', () => {
    const flag = (document: MappingDocument) =>
      placeFlags(acrylate, document).find(({ name }) => name === 'B–B–E')
    expect(flag(THREE_TO_ONE)).toMatchObject({ choice: null, title: 'B–B–E stands at 2 places that differ' })
    expect(flag(split)).toMatchObject({
      choice: 'split',
      parts: [{ name: 'B–B–E (1)' }, { name: 'B–B–E (2)' }],
    })
    const pooled = setPooling(split, ['B', 'B', 'E'], 'pooled', 'the angles agree within 1°')
    expect(flag(pooled)).toMatchObject({ choice: 'pooled', reason: 'the angles agree within 1°' })
    expect(names(pooled)).toEqual(names(THREE_TO_ONE))
    expect(names(setPooling(split, ['B', 'B', 'E'], null))).toEqual(names(THREE_TO_ONE))
  })

  it('has the same numbers for the same places, whichever end the unit is written from and however beads are ordered', () => {
    const [head, tail] = acrylate.attachments
    const turned: RepeatUnit = { ...acrylate, attachments: [tail, head] }
    const reordered: MappingDocument = { ...split, beads: split.beads.toReversed() }
    const placesOf = (unit: RepeatUnit, document: MappingDocument, direction: number): string[] =>
      deriveTerms(unit, document).map(({ name, places }) =>
        [name, ...places.map((place) => beadsAlong(place, direction)).sort()].join(' '),
      )
    expect(placesOf(turned, split, -1)).toEqual(placesOf(acrylate, split, 1))
    expect(placesOf(acrylate, reordered, 1)).toEqual(placesOf(acrylate, split, 1))
  })

  it('stays one term where all places are equivalent', () => {
    const document = setPooling(THREE_TO_ONE, ['B', 'B', 'B'], 'split')
    expect(names(document)).toEqual(names(THREE_TO_ONE))
  })
})

describe('decisions about terms', () => {
  const [, second] = deriveTerms(acrylate, split).filter(({ name }) => name.startsWith('B–B–E ('))
  const decided = setTermUse(split, second, 'left out', 'follows from the other')

  it('leave out the term they name and no other', () => {
    const terms = deriveTerms(acrylate, decided)
    const left = terms.filter((term) => !usedTerms(decided, terms).includes(term))
    expect(left.map(({ name }) => name)).toEqual(['B–B–E (2)'])
    expect(usedTerms(setTermUse(decided, second, null), terms)).toEqual(terms)
  })

  it('follow a type that gets another name, also where that turns the sequence round', () => {
    const renamed = changeBead(decided, 'e', { type: 'A' })
    expect(renamed.poolings?.[0].types).toEqual(['A', 'B', 'B'])
    const terms = deriveTerms(acrylate, renamed)
    expect(terms.filter(({ name }) => name.startsWith('A–B–B ('))).toHaveLength(2)
  })

  it('stay with the type while other beads carry it', () => {
    const document = setPooling(FIVE_TO_ONE, ['B', 'E', 'S1'], 'split')
    const shared = changeBead(document, 's2', { type: 'S1' })
    expect(changeBead(shared, 's1', { type: 'T' }).poolings?.[0].types).toEqual(['B', 'E', 'S1'])
  })

  it('are part of the contract, which asks for the reason of pooling', () => {
    expect(mappingDocumentSchema.parse(decided)).toEqual(decided)
    expect(mappingDocumentSchema.parse(THREE_TO_ONE)).toEqual(THREE_TO_ONE)
    expect(mappingDocumentSchema.safeParse(setPooling(split, ['B', 'B', 'E'], 'pooled')).success).toBe(false)
  })
})

it('derives pooled terms whatever the document says', () => {
  expect(derivePooledTerms(acrylate, split)).toEqual(deriveTerms(acrylate, THREE_TO_ONE))
})

/** A place as text with units counted in one direction from its first bead, so that turned chains can be compared. */
function beadsAlong(place: Place, direction: number): string {
  const along = (row: Place): string =>
    row.map(({ bead, unit }) => `${bead}${direction * (unit - row[0].unit)}`).join('')
  return [along(place), along(place.toReversed())].sort()[0]
}
