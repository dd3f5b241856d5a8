import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { notAKnotCurvatures, periodicCurvatures } from '@shared/numeric'

describe('the not-a-knot spline', () => {
  it('reproduces every cubic, on uneven knots and at the ends', () => {
    const coefficient = fc.double({ min: -3, max: 3, noNaN: true })
    fc.assert(
      fc.property(coefficient, coefficient, coefficient, (a, b, c) => {
        const x = Float64Array.of(0, 0.3, 1, 1.2, 2, 3.1)
        const curvatures = notAKnotCurvatures(
          x,
          x.map((t) => a * t ** 3 + b * t ** 2 + c * t),
        )
        curvatures.forEach((value, knot) => expect(value).toBeCloseTo(6 * a * x[knot] + 2 * b, 9))
      }),
    )
  })
})

describe('the periodic spline', () => {
  it('turns with its knots', () => {
    const count = 24
    const x = Float64Array.from({ length: count }, (_, knot) => (2 * Math.PI * knot) / count)
    const values = x.map((t) => Math.cos(t) + 0.3 * Math.sin(3 * t))
    const curvatures = periodicCurvatures(x, values, 2 * Math.PI)
    const turned = periodicCurvatures(
      x,
      values.map((_, knot) => values[(knot + 5) % count]),
      2 * Math.PI,
    )
    turned.forEach((value, knot) => expect(value).toBeCloseTo(curvatures[(knot + 5) % count], 10))
  })
})
