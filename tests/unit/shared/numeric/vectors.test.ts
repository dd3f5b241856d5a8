import { describe, expect, it } from 'vitest'
import { dot, largestMagnitude } from '@shared/numeric'

describe('dot', () => {
  it('sums products', () => {
    expect(dot(Float64Array.of(1, 2), Float64Array.of(3, 4))).toBe(11)
  })
})

describe('largestMagnitude', () => {
  it('is that of the number furthest from 0, and 0 of none', () => {
    expect(largestMagnitude(Float64Array.of(1, -3, 2))).toBe(3)
    expect(largestMagnitude(new Float64Array())).toBe(0)
  })

  it('lets no NaN pass unseen', () => {
    expect(largestMagnitude(Float64Array.of(5, NaN, 2))).toBeNaN()
  })
})
