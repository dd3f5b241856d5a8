import fc from 'fast-check'
import { expect, it } from 'vitest'
import { compareTypes } from '@shared/mapping'

it('reads numbers in names by their value', () => {
  expect(['S10', 'S2', 'B', 'S1', 'S'].sort(compareTypes)).toEqual(['B', 'S', 'S1', 'S2', 'S10'])
})

it('is a total order: zero for equal names only, and the other way round when turned', () => {
  const name = fc.stringMatching(/^[A-Za-z0-9_+]{1,8}$/)
  fc.assert(
    fc.property(name, name, name, (a, b, c) => {
      expect(compareTypes(a, b) === 0).toBe(a === b)
      expect(Math.sign(compareTypes(a, b))).toBe(0 - Math.sign(compareTypes(b, a)))
      if (compareTypes(a, b) <= 0 && compareTypes(b, c) <= 0)
        expect(compareTypes(a, c)).toBeLessThanOrEqual(0)
    }),
  )
})
