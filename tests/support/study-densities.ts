import type { CoordinateKind } from '@shared/histogram'
import { jacobian } from '@shared/histogram'
import { edgesOf } from './exact-histograms'
import { expectedCounts } from './analytic-files'

/** A potential that automatic inversion is judged on, with its exact bin probabilities. */
export interface StudyDensity {
  readonly name: string
  readonly kind: CoordinateKind
  readonly edges: readonly number[]
  /** Sum 1. */
  readonly probabilities: readonly number[]
  /** In kT, coordinate in nm or rad. */
  readonly energy: (coordinate: number) => number
}

const BINS = 90
const DEGREE = Math.PI / 180
const ANGLE = [0, Math.PI] as const
const TURN = [-Math.PI, Math.PI] as const

const gaussian = (value: number, mean: number, deviation: number): number =>
  Math.exp(-0.5 * ((value - mean) / deviation) ** 2)

/** Six kinds of density that bonded terms show, from one parabola over two states and three wells to none. */
export const STUDY_DENSITIES: readonly StudyDensity[] = [
  density('Harmonic bond', 'bond', [0.23, 0.47], (r) => 750 * (r - 0.35) ** 2),
  density('Anharmonic bond (Morse)', 'bond', [0.27, 0.55], (r) => 8 * (1 - Math.exp(-12 * (r - 0.35))) ** 2),
  density('Angle near 180°', 'angle', ANGLE, (theta) => 0.5 * ((theta / DEGREE - 165) / 12) ** 2),
  density(
    'Double-well angle',
    'angle',
    ANGLE,
    (theta) => -Math.log(gaussian(theta / DEGREE, 100, 8) + 0.7 * gaussian(theta / DEGREE, 140, 10)),
  ),
  density('Three-fold dihedral', 'dihedral', TURN, (phi) => 1.5 * Math.cos(3 * phi) + 0.8 * Math.cos(phi)),
  density('Flat dihedral', 'dihedral', TURN, () => 0),
]

function density(
  name: string,
  kind: CoordinateKind,
  [low, high]: readonly [number, number],
  energy: (coordinate: number) => number,
): StudyDensity {
  const edges = edgesOf(low, high, BINS)
  const term = { energy, jacobian: (coordinate: number) => jacobian(kind, coordinate) }
  return { name, kind, edges, energy, probabilities: expectedCounts(term, 1, edges, 1) }
}
