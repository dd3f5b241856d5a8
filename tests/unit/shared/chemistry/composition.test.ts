import { expect, it } from 'vitest'
import { compositionMass, formulaParts, formulaText } from '@shared/chemistry'

it('writes carbon and hydrogen first, then by symbol', () => {
  expect(formulaText({ O: 2, H: 16, C: 9 })).toBe('C9H16O2')
  expect(formulaText({ N: 1, C: 1, H: 1, Cl: 1 })).toBe('CHClN')
})

it('writes everything by symbol where there is no carbon', () => {
  expect(formulaText({ O: 1, H: 2 })).toBe('H2O')
  expect(formulaText({ Si: 1, O: 2 })).toBe('O2Si')
})

it('writes shares of atoms with up to three decimals and leaves a count of one out', () => {
  expect(formulaParts({ C: 1, H: 2 / 3 })).toEqual([
    { element: 'C', count: '' },
    { element: 'H', count: '0.667' },
  ])
})

it('is empty for nothing', () => {
  expect([formulaText({}), compositionMass({})]).toEqual(['', 0])
})

it('refuses elements without a standard atomic weight', () => {
  expect(() => compositionMass({ Tc: 1 })).toThrow(expect.objectContaining({ code: 'ELEMENT_UNKNOWN' }))
  expect(() => compositionMass({ toString: 1 })).toThrow(expect.objectContaining({ code: 'ELEMENT_UNKNOWN' }))
})
