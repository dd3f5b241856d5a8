import { describe, expect, it } from 'vitest'
import { binMidpoints, binVolumes, type CoordinateKind, jacobian } from '@shared/histogram'
import { createRandom } from '@shared/numeric'
import { type BinGeometry, type JointLambdaChoice, smoothJointCounts } from '@shared/smoothing'
import { edgesOf } from '../../../support/exact-histograms'

function geometryOf(kind: CoordinateKind, values: readonly number[]): BinGeometry {
  const edges = Float64Array.from(values)
  return {
    edges,
    midpoints: binMidpoints(edges),
    volumes: binVolumes(kind, edges),
    jacobian: (coordinate) => jacobian(kind, coordinate),
    period: kind === 'dihedral' ? 2 * Math.PI : null,
    mirrored: false,
  }
}

const bond = geometryOf('bond', edgesOf(0.3, 0.46, 24))
const angle = geometryOf('angle', edgesOf(1.2, 2.7, 20))
const turn = geometryOf('dihedral', edgesOf(-Math.PI, Math.PI, 30))
const spring = (r: number, theta: number) => {
  const [a, b] = [(r - 0.38) / 0.022, (theta - 1.9) / 0.25]
  return Math.exp(-0.5 * (a * a + b * b - a * b))
}
const torsions = (phi: number, psi: number) =>
  Math.exp(Math.cos(phi) - Math.cos(2 * psi) + Math.cos(phi - psi))

/** Poisson counts about a density, `samples` in all; the density itself without a seed. */
function counted(
  x: BinGeometry,
  y: BinGeometry,
  density: (x: number, y: number) => number,
  samples: number,
  seed: number | null,
): Float64Array {
  const means = Array.from(x.midpoints).flatMap((at, i) =>
    Array.from(y.midpoints, (to, j) => x.volumes[i] * y.volumes[j] * density(at, to)),
  )
  const total = means.reduce((sum, mean) => sum + mean, 0)
  const random = seed === null ? null : createRandom(seed)
  return Float64Array.from(means, (mean) => {
    const expected = (samples * mean) / total
    return random === null ? expected : random.poisson(expected)
  })
}

const sum = (values: Float64Array) => values.reduce((total, value) => total + value, 0)
const given = (x: number, y: number): JointLambdaChoice => ({ log10Lambdas: [x, y] })

describe('a smooth joint density', { timeout: 60_000 }, () => {
  it('keeps the number of samples and the margins that the penalty does not see', () => {
    const counts = counted(bond, angle, spring, 3000, 1)
    for (const logs of [given(-2, 1), given(2, 2), given(6, 3)]) {
      const { means } = smoothJointCounts(bond, angle, counts, logs)
      // The weak hold on the coefficients, 1e-8 counts strong, takes a trace of a sample.
      expect(sum(means) / sum(counts)).toBeCloseTo(1, 6)
      const mean = (values: Float64Array) =>
        values.reduce((total, value, cell) => total + value * Math.floor(cell / 20), 0) / sum(values)
      expect(mean(means)).toBeCloseTo(mean(counts), 5)
    }
  })

  it('has as many effective parameters as quadratics along both axes in the stiff limit, and a constant on two turns', () => {
    const stiff = smoothJointCounts(bond, angle, counted(bond, angle, spring, 3000, 1), given(25, 25))
    // 1, x, x² times 1, y, y².
    expect(stiff.effectiveDimension).toBeCloseTo(9, 2)
    const flat = smoothJointCounts(turn, turn, counted(turn, turn, torsions, 3000, 1), given(25, 25))
    expect(flat.effectiveDimension).toBeCloseTo(1, 2)
    const [low, high] = [Math.min(...flat.eta), Math.max(...flat.eta)]
    expect(high - low).toBeLessThan(1e-3)
  })

  it('has fewer effective parameters the larger either λ', () => {
    const counts = counted(bond, turn, (r, phi) => spring(r, 1.9) * torsions(phi, r * 20), 5000, 1)
    const dimension = (x: number, y: number) =>
      smoothJointCounts(bond, turn, counts, given(x, y)).effectiveDimension
    for (const logs of [-1, 1, 3]) {
      expect(dimension(logs + 1, logs)).toBeLessThan(dimension(logs, logs))
      expect(dimension(logs, logs + 1)).toBeLessThan(dimension(logs, logs))
    }
  })

  it('chooses λ where the Fellner–Schall update stays: two starts from scaled bins agree', () => {
    const counts = counted(turn, turn, torsions, 5000, 3)
    const chosen = smoothJointCounts(turn, turn, counts, { by: 'likelihood' })
    const repeated = smoothJointCounts(turn, turn, counts, given(...chosen.log10Lambdas))
    // A chosen λ can be repeated by hand: the same final fit, up to where Newton's method starts from.
    repeated.eta.forEach((value, cell) => expect(value).toBeCloseTo(chosen.eta[cell], 5))
    expect(repeated.effectiveDimension).toBeCloseTo(chosen.effectiveDimension, 4)
    expect(chosen.log10Lambdas.every((log) => Math.abs(100 * log - Math.round(100 * log)) < 1e-9)).toBe(true)
  })

  it('chooses by AIC no worse an AIC than by likelihood', () => {
    const counts = counted(turn, turn, torsions, 3000, 4)
    const akaike = (by: 'likelihood' | 'aic') => {
      const { means, effectiveDimension } = smoothJointCounts(turn, turn, counts, { by })
      const deviance = means.reduce((total, mean, cell) => {
        const count = counts[cell]
        return total + 2 * (mean - count + (count > 0 ? count * Math.log(count / mean) : 0))
      }, 0)
      return deviance + 2 * effectiveDimension
    }
    // The search stops at 0.02 in log₁₀ λ, and λ is rounded after it.
    expect(akaike('aic')).toBeLessThan(akaike('likelihood') + 0.02)
  })

  it('separates where the data do: the coupling of a product density is 0 in the stiff limit', () => {
    const product = counted(bond, angle, (r, theta) => spring(r, 1.9) * spring(0.38, theta), 1e6, null)
    const { eta } = smoothJointCounts(bond, angle, product, given(8, 8))
    const at = (i: number, j: number) => eta[i * 20 + j]
    // Exact cell values of a product of quadratics, refined to effective volumes: what is left is the fourth order.
    expect(Math.abs(at(8, 6) + at(14, 12) - at(8, 12) - at(14, 6))).toBeLessThan(1e-3)
  })

  it('gives the most likely cell no deviation and cells without data a large one', () => {
    const counts = counted(bond, angle, spring, 2000, 5)
    const { eta, deviations, means } = smoothJointCounts(bond, angle, counts, given(2, 2))
    const mode = eta.indexOf(eta.reduce((most, value) => Math.max(most, value), -Infinity))
    expect(deviations[mode]).toBe(0)
    const emptiest = means.indexOf(means.reduce((least, value) => Math.min(least, value), Infinity))
    const inner = deviations.filter((_, cell) => means[cell] > 5)
    expect(deviations[emptiest]).toBeGreaterThan(5 * Math.max(...inner))
  })
})
