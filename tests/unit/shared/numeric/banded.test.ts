import fc from 'fast-check'
import { inv, lusolve, matrix } from 'mathjs'
import { describe, expect, it } from 'vitest'
import { bandedSolve, factorBanded, selectedInverse } from '@shared/numeric'

const SIZE = 9
const HALF = 3

/** A diagonally dominant band, full and by rows. */
function band(entries: readonly number[]) {
  const full = Array.from({ length: SIZE }, () => new Array<number>(SIZE).fill(0))
  const rows = new Float64Array(SIZE * (HALF + 1))
  let next = 0
  for (let row = 0; row < SIZE; row++) {
    for (let k = 0; k <= Math.min(HALF, row); k++) {
      const entry = k === 0 ? 8 + Math.abs(entries[next++]) : entries[next++]
      full[row][row - k] = entry
      full[row - k][row] = entry
      rows[row * (HALF + 1) + k] = entry
    }
  }
  return { full, rows }
}

const entries = fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 40, maxLength: 40 })

/** mathjs, an implementation of its own, as a second opinion. */
describe('the banded solver', () => {
  it('solves as a dense solver does', () => {
    fc.assert(
      fc.property(entries, (values) => {
        const { full, rows } = band(values)
        const right = Array.from({ length: SIZE }, (_, row) => Math.sin(row + 1))
        const factor = factorBanded(rows, SIZE, HALF)
        if (factor === null) throw new Error('A diagonally dominant matrix is positive definite.')
        const solved = bandedSolve(factor, Float64Array.from(right))
        const dense = lusolve(matrix(full), right).toArray().flat() as number[]
        solved.forEach((value, row) => expect(value).toBeCloseTo(dense[row], 10))
      }),
      { numRuns: 50 },
    )
  })

  it('gives the entries of the inverse inside the band', () => {
    fc.assert(
      fc.property(entries, (values) => {
        const { full, rows } = band(values)
        const factor = factorBanded(rows, SIZE, HALF)
        if (factor === null) throw new Error('A diagonally dominant matrix is positive definite.')
        const inverse = selectedInverse(factor)
        const dense = inv(full)
        for (let row = 0; row < SIZE; row++) {
          for (let k = 0; k <= Math.min(HALF, row); k++) {
            expect(inverse[row * (HALF + 1) + k]).toBeCloseTo(dense[row][row - k], 10)
          }
        }
      }),
      { numRuns: 50 },
    )
  })

  it('says when a matrix is not positive definite', () => {
    expect(factorBanded(Float64Array.of(0, 1, 1, 2), 2, 1)).toBeNull()
  })
})
