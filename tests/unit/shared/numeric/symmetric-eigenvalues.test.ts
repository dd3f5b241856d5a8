import { describe, expect, it } from 'vitest'
import { cubicBSplines, cubicBSplineSlopes, symmetricEigenvalues } from '@shared/numeric'

describe('the eigenvalues of a symmetric matrix', () => {
  it('are 1 and 3 of [2 1; 1 2]', () => {
    const [low, high] = symmetricEigenvalues(Float64Array.of(2, 1, 1, 2), 2)
    expect(low).toBeCloseTo(1, 14)
    expect(high).toBeCloseTo(3, 14)
  })

  it('are (2 − 2 cos 2πk/n)³ of third differences on a circle (analytic)', () => {
    const size = 24
    const matrix = new Float64Array(size * size)
    // D′D of the stencil −1, 3, −3, 1: its autocorrelation 20, −15, 6, −1.
    for (let row = 0; row < size; row++) {
      ;[20, -15, 6, -1].forEach((value, distance) => {
        matrix[row * size + ((row + distance) % size)] = value
        matrix[row * size + ((row - distance + size) % size)] = value
      })
    }
    const exact = Array.from({ length: size }, (_, k) => (2 - 2 * Math.cos((2 * Math.PI * k) / size)) ** 3)
    exact.sort((one, other) => one - other)
    // A few dozen roundings of the largest, 64.
    symmetricEigenvalues(matrix, size).forEach((value, k) => expect(value).toBeCloseTo(exact[k], 11))
  })
})

describe('cubic B-splines on a segment', () => {
  it('add up to 1, and have the slopes of their values', () => {
    for (const t of [0, 0.2, 0.5, 0.9, 1]) {
      const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0)
      expect(sum(cubicBSplines(t))).toBeCloseTo(1, 14)
      const [before, after] = [cubicBSplines(t - 1e-5), cubicBSplines(t + 1e-5)]
      // Central differences of a cubic miss 1e-10 of its third derivative, at most 3.
      cubicBSplineSlopes(t).forEach((slope, k) => {
        expect((after[k] - before[k]) / 2e-5).toBeCloseTo(slope, 8)
      })
    }
  })
})
