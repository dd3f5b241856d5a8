import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  angleOf,
  dihedralOf,
  distanceOf,
  placeBead,
  weightedMean,
  type Point,
} from '../../../../server/demo/geometry'

const A: Point = [0.3, 1.1, -0.2]
const B: Point = [-0.9, 0.1, 0.4]
const C: Point = [0.2, -0.3, 0.1]

describe('placeBead', () => {
  it('puts a bead where the distance, angle and dihedral it was given are measured again', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.1, max: 1, noNaN: true }),
        fc.double({ min: 0.05, max: Math.PI - 0.05, noNaN: true }),
        fc.double({ min: -3.14, max: 3.14, noNaN: true }),
        (distance, angle, dihedral) => {
          const D = placeBead(A, B, C, distance, angle, dihedral)
          // 1e-9: the arc cosine of nothing is taken, only rounding of about ten products is left
          expect(distanceOf(C, D)).toBeCloseTo(distance, 9)
          expect(angleOf(B, C, D)).toBeCloseTo(angle, 9)
          expect(dihedralOf(A, B, C, D)).toBeCloseTo(dihedral, 9)
        },
      ),
    )
  })
})

describe('dihedralOf', () => {
  it('is 0 for cis and −180° for trans', () => {
    const cis = dihedralOf([1, 1, 0], [1, 0, 0], [0, 0, 0], [0, 1, 0])
    const trans = dihedralOf([1, 1, 0], [1, 0, 0], [0, 0, 0], [0, -1, 0])
    expect(cis).toBeCloseTo(0, 12)
    expect(trans).toBe(-Math.PI)
  })

  it('is positive when the rear bond stands clockwise of the front one, as IUPAC has it', () => {
    // Looking along −z from the front bead: front bond up, rear bond to the right.
    expect(dihedralOf([0, 1, 1], [0, 0, 1], [0, 0, 0], [1, 0, 0])).toBeCloseTo(Math.PI / 2, 12)
  })
})

describe('weightedMean', () => {
  it('does not need weights that sum to 1', () => {
    expect(
      weightedMean(
        [
          [0, 0, 0],
          [3, 6, 9],
        ],
        [1, 2],
      ),
    ).toEqual([2, 4, 6])
  })
})
