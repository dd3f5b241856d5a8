import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { cosinePowersFromSeries, cosineSeriesFromPowers } from '@shared/forms'

const coefficients = fc.array(fc.double({ min: -100, max: 100, noNaN: true }), { minLength: 1, maxLength: 8 })
const angles = fc.double({ min: -Math.PI, max: Math.PI, noNaN: true })

describe('cosine series and cosine powers', () => {
  it('are the same function of the dihedral', () => {
    fc.assert(
      fc.property(coefficients, angles, (series, phi) => {
        const asSeries = series.reduce((sum, a, n) => sum + a * Math.cos(n * phi), 0)
        const asPowers = cosinePowersFromSeries(series).reduce(
          (sum, c, n) => sum + c * Math.cos(phi - Math.PI) ** n,
          0,
        )
        // Powers up to the seventh have coefficients up to 112 times those of the series.
        expect(Math.abs(asSeries - asPowers)).toBeLessThan(1e-9)
      }),
    )
  })

  it('convert back to where they came from', () => {
    fc.assert(
      fc.property(coefficients, (series) => {
        cosineSeriesFromPowers(cosinePowersFromSeries(series)).forEach((value, n) => {
          expect(Math.abs(value - series[n])).toBeLessThan(1e-9)
        })
      }),
    )
  })

  it('keep whole numbers whole', () => {
    expect(cosinePowersFromSeries([1, 0, 1])).toEqual([0, 0, 2])
    expect(cosinePowersFromSeries([0, 1, 0, 1])).toEqual([0, 2, 0, -4])
    expect(cosineSeriesFromPowers([0, 0, 2])).toEqual([1, 0, 1])
    expect(cosinePowersFromSeries([])).toEqual([])
  })
})
