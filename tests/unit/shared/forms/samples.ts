import { createHistogram, type CoordinateKind, type Histogram, jacobian } from '@shared/histogram'
import { createRandom } from '@shared/numeric'
import { thermalEnergy } from '@shared/units'
import { equalEdges, expectedCounts } from '../../../support/analytic-files'

export const TEMPERATURE = 400
export const KT = thermalEnergy(TEMPERATURE)

/** A potential with the bins it is sampled on. */
export interface SampledTerm {
  readonly kind: CoordinateKind
  readonly range: readonly [low: number, high: number]
  readonly bins: number
  /** kJ/mol, coordinate in nm or rad. */
  readonly energy: (coordinate: number) => number
}

/** Exact expected counts of `samples` samples; with a seed, Poisson counts with these means. */
export function sampled(
  { kind, range, bins, energy }: SampledTerm,
  samples: number,
  seed: number | null = null,
): Histogram {
  const edges = equalEdges(range[0], range[1], bins)
  edges[bins] = range[1]
  const term = { energy, jacobian: (coordinate: number) => jacobian(kind, coordinate) }
  const means = expectedCounts(term, KT, edges, samples)
  const random = createRandom(seed ?? 0)
  const weights = seed === null ? means : means.map((mean) => random.poisson(mean))
  return createHistogram({ kind, edges, weights, content: 'count' })
}

export const HARMONIC_BOND: SampledTerm = {
  kind: 'bond',
  range: [0.2, 0.5],
  bins: 60,
  energy: (r) => 2500 * (r - 0.35) ** 2,
}

export const HARMONIC_ANGLE: SampledTerm = {
  kind: 'angle',
  range: [0, Math.PI],
  bins: 90,
  energy: (theta) => 40 * (theta - 2) ** 2,
}

export const COSINE_ANGLE: SampledTerm = {
  kind: 'angle',
  range: [0, Math.PI],
  bins: 90,
  energy: (theta) => 25 * (Math.cos(theta) - Math.cos(2.2)) ** 2,
}

/** Rises up to 180°, where its slope is not 0: no θ0 inside the domain is best. */
export const STRAIGHT_ANGLE: SampledTerm = {
  kind: 'angle',
  range: [0, Math.PI],
  bins: 90,
  energy: (theta) => 12 * (Math.PI + 0.1 - theta) ** 2,
}

export const QUARTIC_BOND: SampledTerm = {
  kind: 'bond',
  range: [0.2, 0.55],
  bins: 70,
  energy: (r) => 0.5 * 1200 * (r - 0.35) ** 2 - 4000 * (r - 0.35) ** 3 + 60_000 * (r - 0.35) ** 4,
}

export const MORSE_BOND: SampledTerm = {
  kind: 'bond',
  range: [0.15, 0.75],
  bins: 120,
  energy: (r) => 20 * (1 - Math.exp(-8 * (r - 0.35))) ** 2,
}

export const TWO_STATES: SampledTerm = {
  kind: 'bond',
  range: [0.3, 0.8],
  bins: 100,
  energy: (r) =>
    -KT *
    Math.log(
      (0.6 / 0.03) * Math.exp(-((r - 0.5) ** 2) / (2 * 0.03 ** 2)) +
        (0.4 / 0.02) * Math.exp(-((r - 0.62) ** 2) / (2 * 0.02 ** 2)),
    ),
}

export const THREE_COSINES: SampledTerm = {
  kind: 'dihedral',
  range: [-Math.PI, Math.PI],
  bins: 72,
  energy: (phi) => 2.5 * (1 + Math.cos(phi)) - 1.5 * (1 + Math.cos(2 * phi)) + 4 * (1 + Math.cos(3 * phi)),
}

export const SKEWED_TURN: SampledTerm = {
  kind: 'dihedral',
  range: [-Math.PI, Math.PI],
  bins: 72,
  energy: (phi) => 3 * (1 + Math.cos(phi - 0.7)) + 2 * (1 + Math.cos(2 * phi + 1.1)),
}
