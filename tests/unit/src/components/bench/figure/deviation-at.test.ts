import { describe, expect, it } from 'vitest'
import type { Potential } from '@shared/inversion'
import { deviationAt } from '@/components/bench/figure/deviation-at'

const potential = (kind: Potential['kind'], deviations: number[] | null): Potential => ({
  kind,
  temperature: 400,
  knots: Float64Array.of(-2, 0, 2),
  energies: Float64Array.of(1, 0, 1),
  curvatures: new Float64Array(3),
  deviations: deviations && Float64Array.from(deviations),
  populated: [-2.5, 2.5],
  period: kind === 'dihedral' ? 2 * Math.PI : null,
  lowTail: null,
  highTail: null,
})

describe('deviationAt', () => {
  it('is linear between knots', () => {
    expect(deviationAt(potential('angle', [2, 0, 4]), 0.5)).toBe(1)
    expect(deviationAt(potential('angle', [2, 0, 4]), -2)).toBe(2)
    expect(deviationAt(potential('angle', [2, 0, 4]), 2)).toBe(4)
  })

  it('keeps the outermost value beyond the knots of a bond or angle', () => {
    expect(deviationAt(potential('bond', [2, 0, 4]), -3)).toBe(2)
    expect(deviationAt(potential('bond', [2, 0, 4]), 3)).toBe(4)
  })

  it('goes around the turn for a dihedral: both ends of the turn agree', () => {
    const turn = potential('dihedral', [2, 0, 4])
    expect(deviationAt(turn, Math.PI)).toBeCloseTo(3, 12)
    expect(deviationAt(turn, -Math.PI)).toBeCloseTo(3, 12)
  })

  it('is NaN beside a knot nothing is known about, and null without a sample size', () => {
    expect(deviationAt(potential('angle', [2, NaN, 4]), 1)).toBeNaN()
    expect(deviationAt(potential('angle', null), 1)).toBeNull()
  })
})
