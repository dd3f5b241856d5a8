import { describe, expect, it } from 'vitest'
import { createHistogram, type CoordinateKind, type Histogram, jacobian } from '@shared/histogram'
import {
  DEFAULT_INVERSION_SETTINGS,
  invert,
  type InversionSettings,
  straightAngleWarnings,
  type WarningCode,
} from '@shared/inversion'
import { createRandom } from '@shared/numeric'
import { expectedCounts } from '../../../support/analytic-files'
import { edgesOf } from '../../../support/exact-histograms'
import { STUDY_DENSITIES } from '../../../support/study-densities'

const TEMPERATURE = 400
const DEGREE = Math.PI / 180

interface Made {
  readonly kind: CoordinateKind
  readonly edges: readonly number[]
  /** In kT. */
  readonly energy: (coordinate: number) => number
  readonly samples?: number
  readonly seed?: number
}

/** Poisson counts of a potential with the Jacobian of its kind. */
function drawn({ kind, edges, energy, samples = 50_000, seed = 1 }: Made): Histogram {
  const random = createRandom(seed)
  const term = { energy, jacobian: (coordinate: number) => jacobian(kind, coordinate) }
  const weights = expectedCounts(term, 1, edges, samples).map((mean) => random.poisson(mean))
  return createHistogram({ kind, edges, weights, content: 'count' })
}

function codes(histogram: Histogram, settings: Partial<InversionSettings> = {}): WarningCode[] {
  const { warnings } = invert(histogram, TEMPERATURE, { ...DEFAULT_INVERSION_SETTINGS, ...settings })
  return warnings.map(({ code }) => code)
}

const bondEdges = edgesOf(0.23, 0.47, 60)
const spring = (r: number) => 750 * (r - 0.35) ** 2
const twoWells =
  (depth: number, width: number) =>
  (r: number): number =>
    -Math.log(Math.exp(-0.5 * ((r - 0.35) / width) ** 2) + depth * Math.exp(-0.5 * ((r - 0.5) / width) ** 2))

describe('good data raise no doubt', () => {
  it.each(STUDY_DENSITIES.flatMap((density) => [10_000, 100_000].map((samples) => ({ density, samples }))))(
    '$density.name, $samples samples, over 20 seeds',
    ({ density, samples }) => {
      const { kind, edges, energy } = density
      for (let seed = 0; seed < 20; seed++) {
        const doubts = codes(drawn({ kind, edges, energy, samples, seed }))
        // The harmonic angle near 180° has the slope of its parabola there, and a table to 0° is mostly extrapolated.
        const expected: WarningCode[] = ['SLOPE_AT_STRAIGHT_ANGLE', 'EXTRAPOLATION_DOMINATES']
        expect(doubts.filter((code) => kind !== 'angle' || !expected.includes(code))).toEqual([])
      }
    },
  )
})

describe('each doubt fires on its trap and not beside it', () => {
  it('UNIT_DOUBTFUL: angles and dihedrals in radians that were read as degrees', () => {
    const misread = edgesOf(1.5 * DEGREE, 2.5 * DEGREE, 20)
    const energy = (theta: number) => 40 * (theta / DEGREE - 2) ** 2
    for (const kind of ['angle', 'dihedral'] as const) {
      expect(codes(drawn({ kind, edges: misread, energy }))).toContain('UNIT_DOUBTFUL')
      const right = edgesOf(1.5, 2.5, 60)
      expect(codes(drawn({ kind, edges: right, energy: (q) => 40 * (q - 2) ** 2 }))).not.toContain(
        'UNIT_DOUBTFUL',
      )
    }
  })

  it('UNIT_DOUBTFUL: ångströms read as nanometres, and the reverse', () => {
    for (const [factor, doubtful] of [
      [1, false],
      [10, true],
      [0.1, true],
    ] as const) {
      const edges = bondEdges.map((edge) => factor * edge)
      expect(
        codes(drawn({ kind: 'bond', edges, energy: (r) => spring(r / factor) })).includes('UNIT_DOUBTFUL'),
      ).toBe(doubtful)
    }
  })

  it('BOND_AT_ZERO: lengths written as 0 among bonds', () => {
    const edges = edgesOf(0, 0.5, 100)
    const clean = drawn({ kind: 'bond', edges, energy: spring })
    expect(codes(clean)).not.toContain('BOND_AT_ZERO')
    const weights = Float64Array.from(clean.weights)
    weights[0] = 7
    expect(codes({ ...clean, weights })).toContain('BOND_AT_ZERO')
  })

  it('BINS_UNEQUAL: filled bins more than four times as wide as others', () => {
    const mixed = [...edgesOf(0.25, 0.37, 60), ...edgesOf(0.37, 0.45, 8).slice(1)]
    expect(codes(drawn({ kind: 'bond', edges: mixed, energy: spring }))).toContain('BINS_UNEQUAL')
    const mild = [...edgesOf(0.25, 0.37, 60), ...edgesOf(0.37, 0.45, 14).slice(1)]
    expect(codes(drawn({ kind: 'bond', edges: mild, energy: spring }))).not.toContain('BINS_UNEQUAL')
  })

  it('BINS_TOO_WIDE: a well narrower than its bin', () => {
    const narrow = (phi: number) => 0.5 * (phi / (2 * DEGREE)) ** 2
    const background = (phi: number) => -Math.log(Math.exp(-narrow(phi)) + 0.02)
    const turn = (bins: number) => edgesOf(-Math.PI, Math.PI, bins)
    expect(codes(drawn({ kind: 'dihedral', edges: turn(45), energy: background }))).toContain('BINS_TOO_WIDE')
    expect(codes(drawn({ kind: 'dihedral', edges: turn(180), energy: background }))).not.toContain(
      'BINS_TOO_WIDE',
    )
  })

  it('JACOBIAN_OFF: for a bond and an angle, which have one, and not for a dihedral', () => {
    const off = { jacobian: false }
    expect(codes(drawn({ kind: 'bond', edges: bondEdges, energy: spring }), off)).toContain('JACOBIAN_OFF')
    expect(codes(drawn({ kind: 'bond', edges: bondEdges, energy: spring }))).not.toContain('JACOBIAN_OFF')
    const turn = { kind: 'dihedral', edges: edgesOf(-Math.PI, Math.PI, 72), energy: Math.cos } as const
    expect(codes(drawn(turn), off)).not.toContain('JACOBIAN_OFF')
  })

  it.each([45, 60, 90, 180])('JACOBIAN_TWICE: counts that were divided by sin θ, in %i bins', (bins) => {
    const edges = edgesOf(0, Math.PI, bins)
    for (const energy of [
      (theta: number) => 3 * (Math.cos(theta) + 0.8) ** 2,
      (theta: number) => 0.5 * ((theta / DEGREE - 180) / 15) ** 2,
      (theta: number) => -3 * Math.cos(theta - 0.6),
    ]) {
      const histogram = drawn({ kind: 'angle', edges, energy, samples: 1e8 })
      expect(codes(histogram)).not.toContain('JACOBIAN_TWICE')
      const weights = histogram.weights.map(
        (weight, bin) => weight / Math.sin((edges[bin] + edges[bin + 1]) / 2),
      )
      expect(codes({ ...histogram, weights })).toContain('JACOBIAN_TWICE')
    }
  })

  it('BARRIER_UNSAMPLED: two populations without a sample between them', () => {
    const edges = edgesOf(0.2, 0.65, 90)
    const at = (width: number) => drawn({ kind: 'bond', edges, energy: twoWells(0.5, width) })
    expect(codes(at(0.012))).toContain('BARRIER_UNSAMPLED')
    expect(codes(at(0.03))).not.toContain('BARRIER_UNSAMPLED')
    // Stragglers above a gap are no population.
    const straggled = drawn({ kind: 'bond', edges, energy: twoWells(1e-4, 0.012) })
    expect(codes(straggled)).not.toContain('BARRIER_UNSAMPLED')
  })

  it('BARRIER_UNSAMPLED: around the turn, where a single well has no barrier', () => {
    const edges = edgesOf(-Math.PI, Math.PI, 72)
    const wells = (places: readonly number[]) => (phi: number) =>
      -Math.log(places.reduce((sum, place) => sum + Math.exp((Math.cos(phi - place * DEGREE) - 1) * 60), 0))
    const of = (...places: number[]) => codes(drawn({ kind: 'dihedral', edges, energy: wells(places) }))
    expect(of(60, -60)).toContain('BARRIER_UNSAMPLED')
    expect(of(180, 20)).toContain('BARRIER_UNSAMPLED')
    expect(of(180)).not.toContain('BARRIER_UNSAMPLED')
    expect(of(60)).not.toContain('BARRIER_UNSAMPLED')
  })

  it('GAPS_BRIDGED: empty bins inside an unsmoothed curve', () => {
    const off = { smoothing: { mode: 'off' } } as const
    const few = drawn({ kind: 'bond', edges: edgesOf(0.23, 0.47, 120), energy: spring, samples: 500 })
    expect(codes(few, off)).toContain('GAPS_BRIDGED')
    expect(codes(few)).not.toContain('GAPS_BRIDGED')
  })

  it('DIHEDRAL_NEAR_STRAIGHT: one of the angles of a dihedral is often nearly straight', () => {
    const angle = (middle: number) =>
      drawn({
        kind: 'angle',
        edges: edgesOf(0, Math.PI, 90),
        energy: (theta) => 0.5 * ((theta / DEGREE - middle) / 8) ** 2,
      })
    const of = (...middles: number[]) => straightAngleWarnings(middles.map(angle)).map(({ code }) => code)
    expect(of(120, 165)).toEqual(['DIHEDRAL_NEAR_STRAIGHT'])
    expect(of(120, 130)).toEqual([])
    expect(of()).toEqual([])
  })

  it('SLOPE_AT_STRAIGHT_ANGLE: names the option, and is silent once the angle is level', () => {
    const edges = edgesOf(0, Math.PI, 90)
    const histogram = drawn({ kind: 'angle', edges, energy: (theta) => -4 * theta })
    const { warnings } = invert(histogram, TEMPERATURE, DEFAULT_INVERSION_SETTINGS)
    const doubt = warnings.find(({ code }) => code === 'SLOPE_AT_STRAIGHT_ANGLE')
    expect(doubt?.action).toContain('straight angle to level')
    expect(codes(histogram, { straightAngle: 'level' })).not.toContain('SLOPE_AT_STRAIGHT_ANGLE')
  })
})
