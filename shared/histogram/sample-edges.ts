import { InvalidInputError } from '../errors'
import { quantileSorted } from '../numeric'
import { type CoordinateKind, DEGREES_PER_RADIAN } from '../units'
import { coordinateDomain } from './coordinate-domain'

/** Most bins a histogram may have. */
export const MAXIMUM_BINS = 5000

/** Widest bins for raw samples: σ/5 of a bond, 2° of an angle, 5° of a dihedral. */
const BINS_PER_DEVIATION = 5
const WIDEST = { angle: 2 / DEGREES_PER_RADIAN, dihedral: 5 / DEGREES_PER_RADIAN }

/**
 * Bin edges for raw samples: the width of Freedman and Diaconis (2·IQR/∛n; Z. Wahrscheinlichkeitstheorie 57 (1981) 453)
 * but never wider than σ/5 for a bond, 2° for an angle, 5° for a dihedral, and never more than 5,000 bins. Bonds: whole
 * multiples of the width around the samples with one empty bin on each side. Angles and dihedrals: equal bins over the
 * whole domain.
 *
 * @param samples internal units, at least two, inside the domain of the kind
 * @returns edges, length n + 1, that contain every sample
 * @throws {InvalidInputError} TOO_FEW_SAMPLES with fewer than two samples, or when all samples of a bond are equal;
 *   NUMBER_NOT_FINITE with the index of the first bad sample
 */
export function sampleEdges(kind: CoordinateKind, samples: ArrayLike<number>): Float64Array {
  if (samples.length < 2) {
    throw new InvalidInputError('TOO_FEW_SAMPLES', 'At least two samples are needed to choose bins.')
  }
  const sorted = Float64Array.from(samples)
  const bad = sorted.findIndex((sample) => !Number.isFinite(sample))
  if (bad >= 0) {
    throw new InvalidInputError('NUMBER_NOT_FINITE', `Sample ${bad + 1} is not a finite number.`, {
      index: bad,
    })
  }
  sorted.sort()
  const spread = quantileSorted(sorted, 0.75) - quantileSorted(sorted, 0.25)
  const freedmanDiaconis = (2 * spread) / Math.cbrt(sorted.length)
  return kind === 'bond' ? bondEdges(sorted, freedmanDiaconis) : turnEdges(kind, freedmanDiaconis)
}

function turnEdges(kind: 'angle' | 'dihedral', proposed: number): Float64Array {
  const [low, high] = coordinateDomain(kind)
  const width = proposed > 0 ? Math.min(proposed, WIDEST[kind]) : WIDEST[kind]
  // Rounding must not turn 180°/2° into 91 bins.
  const bins = Math.min(MAXIMUM_BINS, Math.ceil((high - low) / width - 1e-9))
  return Float64Array.from({ length: bins + 1 }, (_, edge) =>
    edge === bins ? high : low + ((high - low) * edge) / bins,
  )
}

function bondEdges(sorted: Float64Array, proposed: number): Float64Array {
  const [first, last] = [sorted[0], sorted[sorted.length - 1]]
  const widest = sampleDeviation(sorted) / BINS_PER_DEVIATION
  if (!(widest > 0))
    throw new InvalidInputError('TOO_FEW_SAMPLES', 'All samples are equal: there is no spread to bin.')
  const finest = (last - first) / (MAXIMUM_BINS - 4)
  const width = Math.max(finest, proposed > 0 ? Math.min(proposed, widest) : widest)
  const start = Math.max(0, Math.floor(first / width) - 1)
  const bins = Math.floor(last / width) + 2 - start
  return Float64Array.from({ length: bins + 1 }, (_, edge) => (start + edge) * width)
}

function sampleDeviation(values: Float64Array): number {
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length
  const squares = values.reduce((sum, value) => sum + (value - mean) ** 2, 0)
  return Math.sqrt(squares / (values.length - 1))
}
