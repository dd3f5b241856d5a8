import {
  binMidpoints,
  binVolumes,
  createHistogram,
  type CoordinateKind,
  type Histogram,
} from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert, type Inversion, type InversionSettings } from '@shared/inversion'
import { thermalEnergy } from '@shared/units'

export const TEMPERATURE = 400

/** Evenly spaced edges, in internal units. */
export const evenEdges = (low: number, high: number, bins: number): Float64Array =>
  Float64Array.from({ length: bins + 1 }, (_, edge) => low + ((high - low) * edge) / bins)

/** Expected counts of a known potential, rounded to whole counts; all of them independent. */
export const countsOf = (
  kind: CoordinateKind,
  edges: Float64Array,
  energy: (coordinate: number) => number,
  total: number,
): Histogram => {
  const kT = thermalEnergy(TEMPERATURE)
  const midpoints = binMidpoints(edges)
  const masses = binVolumes(kind, edges).map((volume, bin) => volume * Math.exp(-energy(midpoints[bin]) / kT))
  const sum = masses.reduce((all, mass) => all + mass, 0)
  const weights = masses.map((mass) => Math.round((total * mass) / sum))
  return createHistogram({ kind, edges, weights, content: 'count', independentSamples: total / 10 })
}

const HALF_TURN = Math.PI

/** A bent angle with a harmonic potential about 110°, in 2° bins from 60° to 180°. */
export const angleCounts = (): Histogram =>
  countsOf(
    'angle',
    evenEdges(HALF_TURN / 3, HALF_TURN, 60),
    (angle) => 60 * (angle - (110 * HALF_TURN) / 180) ** 2,
    200_000,
  )

/** A stiff bond about 0.3 nm, in bins of 0.005 nm from 0.2 to 0.4 nm. */
export const bondCounts = (): Histogram =>
  countsOf('bond', evenEdges(0.2, 0.4, 40), (length) => 3000 * (length - 0.3) ** 2, 200_000)

/** A threefold torsion in 5° bins around the turn. */
export const dihedralCounts = (): Histogram =>
  countsOf(
    'dihedral',
    evenEdges(-HALF_TURN, HALF_TURN, 72),
    (angle) => 3 * (1 + Math.cos(3 * angle)),
    200_000,
  )

/** The same histogram as a density nobody stated a sample size for. */
export const withoutSampleSize = (histogram: Histogram): Histogram =>
  createHistogram({
    kind: histogram.kind,
    edges: histogram.edges,
    weights: histogram.weights,
    content: 'probability',
  })

export const inverted = (histogram: Histogram, settings: Partial<InversionSettings> = {}): Inversion =>
  invert(histogram, TEMPERATURE, { ...DEFAULT_INVERSION_SETTINGS, ...settings })
