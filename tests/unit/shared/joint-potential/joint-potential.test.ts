import { describe, expect, it } from 'vitest'
import { InvalidInputError } from '@shared/errors'
import { createJointHistogram, type JointHistogram } from '@shared/histogram'
import {
  DEFAULT_JOINT_SETTINGS,
  jointEnergy,
  jointPotential,
  type JointPotentialSettings,
  jointSlopes,
  jointTable,
} from '@shared/joint-potential'
import { createRandom } from '@shared/numeric'
import { thermalEnergy } from '@shared/units'
import { edgesOf } from '../../../support/exact-histograms'
import { jointCase, type JointCase } from '../../../support/joint-histograms'

const KT = thermalEnergy(400)
const GIVEN: JointPotentialSettings = {
  ...DEFAULT_JOINT_SETTINGS,
  smoothing: { mode: 'manual', log10Lambdas: [3, 2] },
}
const BOND_ANGLE: JointCase = {
  kinds: ['bond', 'angle'],
  xEdges: edgesOf(0.28, 0.48, 32),
  yEdges: edgesOf(0.8, 3, 36),
  energy: (r, theta) => {
    const [a, b] = [(r - 0.38) / 0.018, (theta - 1.9) / 0.22]
    return 0.5 * (a * a + b * b - 1.2 * a * b) + 0.02 * b ** 4
  },
}
const ANGLE_TURN: JointCase = {
  kinds: ['angle', 'dihedral'],
  xEdges: edgesOf(1.1, 2.7, 30),
  yEdges: edgesOf(-Math.PI, Math.PI, 36),
  energy: (theta, phi) => 0.5 * ((theta - 1.9) / 0.2 - 0.6 * Math.cos(phi)) ** 2 + Math.cos(3 * phi),
}
const ANY = { low: null, high: null }
const bondAngle = (seed = 1) => jointCase(BOND_ANGLE, 20_000, seed)
const angleTurn = (seed = 1) => jointCase(ANGLE_TURN, 20_000, seed)
const potentialOf = (joint: JointHistogram, settings = GIVEN) => jointPotential(joint, 400, settings)

function codeOf(work: () => unknown): string {
  try {
    work()
  } catch (error) {
    if (error instanceof InvalidInputError) return error.code
    throw error
  }
  return 'accepted'
}

/** Places well inside, at the rims and far outside the data. */
function places(count: number): (readonly [number, number])[] {
  const random = createRandom(5)
  return Array.from({ length: count }, () => [0.2 + 0.35 * random.uniform(), Math.PI * random.uniform()])
}

function transposed({ kinds, xEdges, yEdges, weights }: JointHistogram): JointHistogram {
  const [nx, ny] = [xEdges.length - 1, yEdges.length - 1]
  return createJointHistogram({
    kinds: [kinds[1], kinds[0]],
    xEdges: yEdges,
    yEdges: xEdges,
    weights: Array.from({ length: nx * ny }, (_, cell) => weights[(cell % nx) * ny + Math.floor(cell / nx)]),
    content: 'count',
  })
}

// Each fit takes a quarter of a second on a free processor; the limit is for crowded ones.
describe('a joint potential', { timeout: 60_000 }, () => {
  it('has least value 0, where it says', () => {
    for (const joint of [bondAngle(), angleTurn()]) {
      const { surface, minimum, knots } = potentialOf(joint)
      expect(jointEnergy(surface, minimum.x, minimum.y)).toBeCloseTo(0, 9)
      const around = Array.from({ length: 41 * 41 }, (_, place) =>
        jointEnergy(
          surface,
          minimum.x + 0.002 * (Math.floor(place / 41) - 20),
          minimum.y + 0.01 * ((place % 41) - 20),
        ),
      )
      // Rounding of sums of sixteen coefficients.
      expect(Math.min(...around, ...knots.energies)).toBeGreaterThan(-1e-9)
    }
  })

  it('has slopes that are the derivatives of its energy, everywhere', () => {
    const { surface } = potentialOf(bondAngle())
    for (const [x, y] of places(300)) {
      const [alongX, alongY] = jointSlopes(surface, x, y)
      const step = 1e-5
      const central = (dx: number, dy: number) =>
        (jointEnergy(surface, x + dx, y + dy) - jointEnergy(surface, x - dx, y - dy)) / (2 * step)
      // Central differences miss U‴ step²/6 and the rounding of U over the step.
      const slack = 1e-6 * (1 + Math.abs(alongX) + Math.abs(alongY)) + 1e-9 * jointEnergy(surface, x, y)
      expect(Math.abs(central(step, 0) - alongX)).toBeLessThan(slack * 100)
      expect(Math.abs(central(0, step) - alongY)).toBeLessThan(slack)
    }
  })

  it('closes its turn without a seam', () => {
    const { surface } = potentialOf(angleTurn())
    for (const theta of [1.3, 1.9, 2.5, 3]) {
      const [left, right] = [-Math.PI, Math.PI].map((phi) => [
        jointEnergy(surface, theta, phi),
        ...jointSlopes(surface, theta, phi),
      ])
      left.forEach((value, index) => expect(value).toBeCloseTo(right[index], 8))
      expect(jointEnergy(surface, theta, 1 + 4 * Math.PI)).toBeCloseTo(jointEnergy(surface, theta, 1), 8)
    }
  })

  it('does not care where a turn begins', () => {
    const joint = angleTurn()
    const [rows, shift] = [36, 13]
    const weights = joint.weights.map(
      (_, cell) => joint.weights[Math.floor(cell / rows) * rows + (((cell % rows) + shift) % rows)],
    )
    const [one, other] = [joint, { ...joint, weights }].map((each) => potentialOf(each).surface)
    for (const phi of [-2, 0, 1.1]) {
      // A turn of 36 bins has 24 splines, so 13 bins are no whole number of splines: a trace of their places is left.
      const moved = jointEnergy(other, 1.9, phi - (shift * 2 * Math.PI) / rows)
      expect(Math.abs(moved - jointEnergy(one, 1.9, phi))).toBeLessThan(0.05 * KT)
    }
  })

  it('is transposed with its axes', () => {
    for (const joint of [bondAngle(), angleTurn()]) {
      const { surface } = potentialOf(joint)
      const swapped = potentialOf(transposed(joint), {
        ...GIVEN,
        smoothing: { mode: 'manual', log10Lambdas: [2, 3] },
      }).surface
      for (const [x, y] of places(100)) {
        const energy = jointEnergy(surface, x, y)
        // Newton runs to 1e-10; far outside energies are thousands of kJ/mol.
        expect(Math.abs(jointEnergy(swapped, y, x) - energy)).toBeLessThan(1e-6 * (1 + energy))
      }
    }
  })

  it('chooses transposed λ for transposed data', () => {
    const [one, other] = [bondAngle(), transposed(bondAngle())].map((joint) =>
      potentialOf(joint, DEFAULT_JOINT_SETTINGS),
    )
    // The search ends within 0.003 of its fixed point, and both are rounded to 0.01.
    expect(other.smoothing.log10Lambdas[0]).toBeCloseTo(one.smoothing.log10Lambdas[1], 1)
    expect(other.smoothing.log10Lambdas[1]).toBeCloseTo(one.smoothing.log10Lambdas[0], 1)
    expect(other.smoothing.effectiveDimension).toBeCloseTo(one.smoothing.effectiveDimension, 1)
  })

  it('stays when counts and λ are scaled together', () => {
    const joint = bondAngle()
    const tenfold = { ...joint, weights: joint.weights.map((weight) => 10 * weight) }
    const settings: JointPotentialSettings = {
      ...GIVEN,
      smoothing: { mode: 'manual', log10Lambdas: [4, 3] },
    }
    const [one, other] = [potentialOf(joint), potentialOf(tenfold, settings)]
    one.knots.energies.forEach((energy, cell) => {
      if (energy > 4 * KT) return
      // The same equations, up to the weak hold and to where too few counts speak for a coefficient.
      expect(Math.abs(other.knots.energies[cell] - energy)).toBeLessThan(1e-4 * KT)
      expect(other.knots.deviations[cell] * Math.sqrt(10)).toBeCloseTo(one.knots.deviations[cell], 3)
    })
  })

  it('never turns down beyond its grid, along either axis', () => {
    for (const seed of [1, 2]) {
      const { surface } = potentialOf(jointCase(BOND_ANGLE, 500, seed))
      const lines = [
        ...[1.3, 1.9, 2.6].map((y) => (t: number) => jointEnergy(surface, 0.48 + 0.3 * t, y)),
        ...[1.3, 1.9, 2.6].map((y) => (t: number) => jointEnergy(surface, 0.28 - 0.25 * t, y)),
        ...[0.32, 0.38, 0.44].map((x) => (t: number) => jointEnergy(surface, x, 3 + 0.4 * t)),
        ...[0.2, 0.38, 0.7].map((x) => (t: number) => jointEnergy(surface, x, 0.8 - t)),
      ]
      for (const line of lines) {
        const energies = Array.from({ length: 50 }, (_, step) => line(step / 49))
        energies.slice(1).forEach((energy, step) => expect(energy).toBeGreaterThan(energies[step]))
      }
    }
  })

  it('is finite with least value 0 for scattered counts, a spike, a wall and a thin ridge', () => {
    const random = createRandom(11)
    const shapes: ((ix: number, iy: number) => number)[] = [
      () => (random.uniform() < 0.05 ? 1 + random.integer(4) : 0),
      (ix, iy) => (ix === 3 && iy === 3 ? 1e9 : random.poisson(0.3)),
      (ix, iy) => (ix > 14 && iy > 10 ? 1e5 : 0),
      (ix, iy) => random.poisson(1e6 * Math.exp(-0.5 * ((ix - iy) / 0.8) ** 2)),
    ]
    for (const shape of shapes) {
      const { xEdges, yEdges } = BOND_ANGLE
      const joint = createJointHistogram({
        kinds: ['bond', 'angle'],
        xEdges,
        yEdges,
        weights: Array.from({ length: 32 * 36 }, (_, cell) => shape(Math.floor(cell / 36), cell % 36)),
        content: 'count',
      })
      const { surface, knots, smoothing } = potentialOf(joint, DEFAULT_JOINT_SETTINGS)
      const table = jointTable(surface, { x: { ...ANY, rows: 41 }, y: { ...ANY, rows: 41 } })
      const values = [...table.energies, ...table.xForces, ...table.yForces, ...knots.deviations]
      expect(values.every(Number.isFinite)).toBe(true)
      // Rounding of energies up to a million kJ/mol.
      expect(Math.min(...table.energies)).toBeGreaterThan(-1e-6)
      expect(smoothing.effectiveDimension).toBeGreaterThan(8.9)
    }
  })

  it('says what it was given: N, λ, criterion, and plain data that can be sent to another thread', () => {
    const potential = potentialOf(bondAngle())
    expect(potential.smoothing).toMatchObject({ mode: 'manual', criterion: null, log10Lambdas: [3, 2] })
    expect(potential.independentSamples).toBe(bondAngle().weights.reduce((sum, count) => sum + count, 0))
    expect(structuredClone(potential)).toEqual(potential)
  })

  it('follows the raw energies of well-filled cells', () => {
    const { knots } = potentialOf(jointCase(BOND_ANGLE, 1e6))
    const differences = Array.from(knots.rawEnergies).flatMap((raw, cell) =>
      knots.energies[cell] < 4 * KT ? [Math.abs(raw - knots.energies[cell]) / KT] : [],
    )
    // A cell is an average of exp(−U/kT), not its value at the midpoint: the raw energy is off by up to w²(U″ − U′²)/24.
    expect(Math.max(...differences)).toBeLessThan(0.1)
  })

  it('treats stated independent samples as counts divided by g', () => {
    const joint = bondAngle()
    const total = joint.weights.reduce((sum, count) => sum + count, 0)
    const fewer = potentialOf({ ...joint, independentSamples: total / 4 })
    const divided = potentialOf({ ...joint, weights: joint.weights.map((weight) => weight / 4) })
    expect(fewer.knots.energies).toEqual(divided.knots.energies)
  })

  it('refuses a density without a stated number of samples, and takes it with one', () => {
    const { weights, ...rest } = bondAngle()
    const density = createJointHistogram({ ...rest, weights, content: 'probability' })
    expect(codeOf(() => potentialOf(density))).toBe('SAMPLE_SIZE_UNKNOWN')
    expect(potentialOf({ ...density, independentSamples: 5000 }).independentSamples).toBe(5000)
  })

  it('refuses what it cannot smooth', () => {
    const joint = bondAngle()
    const line = { ...joint, weights: joint.weights.map((weight, cell) => (cell % 36 === 18 ? weight : 0)) }
    expect(codeOf(() => potentialOf(line))).toBe('TOO_FEW_BINS')
    expect(codeOf(() => jointPotential(joint, 0, GIVEN))).toBe('TEMPERATURE_INVALID')
    const wild: JointPotentialSettings = {
      ...GIVEN,
      smoothing: { mode: 'manual', log10Lambdas: [2, NaN] },
    }
    expect(codeOf(() => potentialOf(joint, wild))).toBe('SETTING_INVALID')
  })

  it('warns of few samples, of data at the edge and of a turn that is not whole', () => {
    const codes = (joint: JointHistogram) => potentialOf(joint).warnings.map(({ code }) => code)
    expect(codes(bondAngle())).toEqual([])
    expect(codes(jointCase(BOND_ANGLE, 300, 1))).toContain('JOINT_SPARSE')
    const cut: JointCase = { ...BOND_ANGLE, xEdges: edgesOf(0.28, 0.38, 16) }
    expect(codes(jointCase(cut, 20_000, 1))).toContain('DATA_AT_EDGE')
    const half: JointCase = { ...ANGLE_TURN, yEdges: edgesOf(-Math.PI, 2, 30) }
    expect(codes(jointCase(half, 20_000, 1))).toContain('TURN_INCOMPLETE')
  })
})
