import { describe, expect, it } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import { deriveTerms, renewBeadIds, setPooling, setTermUse } from '@shared/mapping'
import { HEXYL_ACRYLATE, THREE_TO_ONE } from './hexyl-acrylate'

const unit = await parseRepeatUnit(HEXYL_ACRYLATE)

describe('renewBeadIds', () => {
  it('gives every bead a new id and changes nothing else about the terms', () => {
    const renewed = renewBeadIds(THREE_TO_ONE, 'n-')
    expect(renewed.beads.map(({ id }) => id)).toEqual(['n-b', 'n-e', 'n-h'])
    const names = (document: typeof renewed) => deriveTerms(unit, document).map(({ name }) => name)
    expect(names(renewed)).toEqual(names(THREE_TO_ONE))
  })

  it('takes choices about the terms of a split sequence along', () => {
    const split = setPooling(THREE_TO_ONE, ['B', 'B', 'E'], 'split')
    const [, second] = deriveTerms(unit, split).filter(({ placeKey }) => placeKey !== '')
    const renewed = renewBeadIds(setTermUse(split, second, 'left out', 'why'), 'n-')
    const [, same] = deriveTerms(unit, renewed).filter(({ placeKey }) => placeKey !== '')
    expect(renewed.termChoices?.[0].placeKey).toBe(same.placeKey)
  })
})
