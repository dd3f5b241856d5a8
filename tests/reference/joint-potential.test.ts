import { describe, expect, it } from 'vitest'
import { DEFAULT_JOINT_SETTINGS, jointEnergy, jointPotential, jointSlopes } from '@shared/joint-potential'
import { DEFAULT_INVERSION_SETTINGS, invert, potentialEnergy } from '@shared/inversion'
import { createHistogram } from '@shared/histogram'
import { thermalEnergy } from '@shared/units'
import { edgesOf } from '../support/exact-histograms'
import { jointCase, type JointCase } from '../support/joint-histograms'

const TEMPERATURE = 400
const KT = thermalEnergy(TEMPERATURE)

/** Source: analytic. A spring of bond and angle with a coupling term; its least value is 0 at (0.38 nm, 1.9 rad). */
const SPRINGS: JointCase = {
  kinds: ['bond', 'angle'],
  xEdges: edgesOf(0.3, 0.48, 90),
  yEdges: edgesOf(0.8, Math.PI, 120),
  energy: (r, theta) => {
    const [a, b] = [(r - 0.38) / 0.018, (theta - 1.9) / 0.25]
    return (0.5 * (a * a + b * b - a * b)) / 0.75
  },
}

/** Source: analytic. An angle beside a torsion that moves it. */
const TORSION: JointCase = {
  kinds: ['angle', 'dihedral'],
  xEdges: edgesOf(0.9, 3, 70),
  yEdges: edgesOf(-Math.PI, Math.PI, 72),
  energy: (theta, phi) => {
    const a = (theta - 1.9) / 0.2
    return 0.5 * a * a + 1.5 * Math.cos(3 * phi) + 0.8 * Math.cos(phi) + 0.6 * a * Math.cos(phi)
  },
}

/** Places inside the grid where the true potential is less than 6 kT above its least, with the error of a surface in kT. */
function errors(exact: JointCase, samples: number) {
  const { surface } = jointPotential(jointCase(exact, samples), TEMPERATURE, DEFAULT_JOINT_SETTINGS)
  const inside = (edges: readonly number[]) => edgesOf(edges[0], edges[edges.length - 1], 157)
  const places = inside(exact.xEdges).flatMap((x) => inside(exact.yEdges).map((y) => ({ x, y })))
  const least = Math.min(...places.map(({ x, y }) => exact.energy(x, y)))
  return places
    .filter(({ x, y }) => exact.energy(x, y) < least + 6)
    .map(({ x, y }) => ({
      x,
      y,
      error: jointEnergy(surface, x, y) / KT - (exact.energy(x, y) - least),
      slopes: jointSlopes(surface, x, y),
    }))
}

const largest = (values: readonly number[]) => Math.max(...values.map(Math.abs))

// Each fit takes a quarter of a second on a free processor; the limit is for crowded ones.
describe('a joint potential from exact cell probabilities', { timeout: 120_000 }, () => {
  it('is the coupled spring they came from, with its forces', () => {
    const found = errors(SPRINGS, 1e7)
    // Third differences do not see a quadratic: what is left is the fourth order of the cell size.
    expect(largest(found.map(({ error }) => error))).toBeLessThan(1e-3)
    const forces = found.map(({ x, y, slopes }) => {
      const [a, b] = [(x - 0.38) / 0.018, (y - 1.9) / 0.25]
      const exact = [(a - b / 2) / 0.75 / 0.018, (b - a / 2) / 0.75 / 0.25]
      return Math.max(Math.abs(slopes[0] / KT - exact[0]) * 0.018, Math.abs(slopes[1] / KT - exact[1]) * 0.25)
    })
    // kT per standard deviation of each coordinate.
    expect(largest(forces)).toBeLessThan(0.01)
  })

  it('is the coupled torsion they came from', () => {
    // The grid of 70 × 72 cells carries 10⁷ counts; 24 splines a turn follow cos 3φ to about 0.001 of its amplitude.
    expect(largest(errors(TORSION, 1e7).map(({ error }) => error))).toBeLessThan(0.01)
  })

  it('is the sum of both single potentials where the terms are independent, over seeds within the band', () => {
    const independent: JointCase = {
      ...SPRINGS,
      energy: (r, theta) => 0.5 * ((r - 0.38) / 0.02) ** 2 + 0.5 * ((theta - 1.9) / 0.3) ** 2,
    }
    const scores = [1, 2, 3, 4].flatMap((seed) => {
      const joint = jointCase(independent, 20_000, seed)
      const { knots, minimum, surface } = jointPotential(joint, TEMPERATURE, DEFAULT_JOINT_SETTINGS)
      const [bond, angle] = singles(joint).map((histogram) => {
        const { potential } = invert(histogram, TEMPERATURE, DEFAULT_INVERSION_SETTINGS)
        return (coordinate: number) => potentialEnergy(potential, coordinate)
      })
      const constant = bond(minimum.x) + angle(minimum.y)
      return Array.from(knots.x).flatMap((x, column) =>
        Array.from(knots.y).flatMap((y, row) => {
          const sum = bond(x) + angle(y) - constant
          const deviation = knots.deviations[column * knots.y.length + row]
          if (sum > 5 * KT || deviation < 0.02 * KT) return []
          return [(jointEnergy(surface, x, y) - sum) / deviation]
        }),
      )
    })
    const square = scores.reduce((sum, score) => sum + score * score, 0) / scores.length
    // Both are made from the same counts and share most of their noise, so they lie closer than two independent estimates.
    expect(Math.sqrt(square)).toBeLessThan(1.2)
    expect(scores.filter((score) => Math.abs(score) > 3).length / scores.length).toBeLessThan(0.02)
  })

  it('has a band that holds the truth as often as it says, pooled over seeds and places', () => {
    const scores = [1, 2, 3, 4].flatMap((seed) => {
      const { knots } = jointPotential(jointCase(TORSION, 20_000, seed), TEMPERATURE, DEFAULT_JOINT_SETTINGS)
      const truth = Array.from(knots.x).flatMap((x) => Array.from(knots.y, (y) => TORSION.energy(x, y)))
      const mode = knots.deviations.indexOf(Math.min(...knots.deviations))
      const least = Math.min(...truth)
      return truth.flatMap((energy, cell) => {
        if (energy > least + 6 || cell === mode) return []
        const found = (knots.energies[cell] - knots.energies[mode]) / KT
        return [(found - (energy - truth[mode])) / (knots.deviations[cell] / KT)]
      })
    })
    const share = scores.filter((score) => Math.abs(score) < 1.96).length / scores.length
    // 95 % is promised on average; four repeats of a dozen or so independent places each leave a few per cent of play.
    expect(share).toBeGreaterThan(0.88)
    expect(share).toBeLessThan(0.995)
  })
})

function singles({ kinds, xEdges, yEdges, weights }: ReturnType<typeof jointCase>) {
  const rows = yEdges.length - 1
  const x = new Float64Array(xEdges.length - 1)
  const y = new Float64Array(rows)
  weights.forEach((weight, cell) => {
    x[Math.floor(cell / rows)] += weight
    y[cell % rows] += weight
  })
  return [
    createHistogram({ kind: kinds[0], edges: xEdges, weights: x, content: 'count' }),
    createHistogram({ kind: kinds[1], edges: yEdges, weights: y, content: 'count' }),
  ]
}
