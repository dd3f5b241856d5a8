import { describe, expect, it } from 'vitest'
import { gaussianShape } from '../../../../shared/forms/gaussian-shape'
import { likelihoodOf, type Shape } from '../../../../shared/forms/likelihood'
import { likelihoodCells, mergeCells } from '../../../../shared/forms/likelihood-cells'
import { linearShape } from '../../../../shared/forms/linear-shape'
import { maximiseLikelihood } from '../../../../shared/forms/maximise-likelihood'
import { morseShape } from '../../../../shared/forms/morse'
import { HARMONIC_BOND, MORSE_BOND, sampled, TEMPERATURE, TWO_STATES } from './samples'

const bond = likelihoodCells(sampled(MORSE_BOND, 5000, 1), TEMPERATURE, true, null)
const states = likelihoodCells(sampled(TWO_STATES, 5000, 1), TEMPERATURE, true, null)

const SHAPES: readonly (readonly [string, typeof bond, Shape, readonly number[]])[] = [
  ['a parabola', bond, linearShape(bond.points, [(q) => q, (q) => q * q]), [3, -9]],
  ['Morse', bond, morseShape(bond), [0.2, 0.4, -0.1]],
  ['Morse next to its harmonic limit', bond, morseShape(bond), [0.2, 1e-5, -0.1]],
  ['three Gaussians', states, gaussianShape(states, 3), [-0.8, 0.1, 1.2, -0.6, -0.9, -0.7, 0.3, -0.2]],
]

describe('the likelihood', () => {
  it.each(SHAPES)('of %s has the analytic score that its values show', (_, cells, shape, start) => {
    const { newPoint, evaluate } = likelihoodOf(cells, shape)
    const here = newPoint(start)
    evaluate(here)
    start.forEach((_value, index) => {
      const step = 1e-5
      const [below, above] = [-step, step].map((shift) => {
        const point = newPoint(start.map((value, other) => (other === index ? value + shift : value)))
        evaluate(point)
        return point.value
      })
      // Rounding 1e-15/1e-5 and the third derivative times 1e-10.
      expect(Math.abs(here.score[index] - (above - below) / (2 * step))).toBeLessThan(1e-7)
    })
    expect(here.probabilities.reduce((sum, probability) => sum + probability, 0)).toBeCloseTo(1, 12)
  })

  it('is finite where a filled bin lies hundreds of kT up', () => {
    const { newPoint, evaluate } = likelihoodOf(bond, linearShape(bond.points, [(q) => (q - 0.3) ** 2]))
    const point = newPoint([-1e6])
    evaluate(point)
    expect(point.value).toBeLessThan(-100)
    expect(point.value).toBeGreaterThan(-Infinity)
    expect(Number.isFinite(point.score[0])).toBe(true)
  })

  it('of merged bins has the same maximum to within the width of the bins', () => {
    const fine = likelihoodCells(sampled({ ...HARMONIC_BOND, bins: 300 }, 1e6), TEMPERATURE, true, null)
    const coarse = mergeCells(fine, 60)
    expect(coarse.bins[1] - coarse.bins[0]).toBe(60)
    const [one, other] = [fine, coarse].map((cells) => {
      const shape = linearShape(cells.points, [(q) => q - 0.35, (q) => (q - 0.35) ** 2])
      return maximiseLikelihood(cells, shape, [0, -500]).beta
    })
    expect(other[1] / one[1]).toBeCloseTo(1, 5)
  })
})
