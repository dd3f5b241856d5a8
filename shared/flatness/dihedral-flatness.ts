import { deviationAt } from '../basins/curve-deviation'
import { curvePoints } from '../basins/curve-points'
import { InvalidInputError } from '../errors'
import { type Inversion, potentialEnergy } from '../inversion'
import { thermalEnergy } from '../units'
import { binnedFlatDivergence, curveFlatDivergence, flatDivergenceByChance } from './flat-divergence'
import { flatLikelihoodRatio } from './flat-likelihood-ratio'
import { type DihedralFlatness, FLAT_BELOW, FLAT_DEVIATIONS } from './flatness'

/**
 * Judges whether a dihedral may be dropped (methods §7): amplitude of its potential where it was seen, divergence from the flat
 * distribution, likelihood ratio against it, and a verdict. 'flat' needs the whole band below the threshold all around the turn, 'keep'
 * the whole band above it somewhere. A wave that is hidden in noise widens the band: U = a cos nφ is known from N samples to
 * σ(a) = √(2/N), so that amplitudes up to 4√(2/N) would go unseen, however smooth the curve.
 *
 * @param inversion of a dihedral; N is its number of independent samples
 * @param flatBelow kT, above 0
 * @throws {InvalidInputError} SETTING_INVALID for another kind, or a threshold that is not above 0
 */
export function dihedralFlatness(
  inversion: Pick<Inversion, 'kind' | 'bins' | 'potential' | 'independentSamples'>,
  flatBelow: number = FLAT_BELOW,
): DihedralFlatness {
  checkInput(inversion.kind, flatBelow)
  const { potential, independentSamples } = inversion
  const { edges, weights } = inversion.bins
  const kT = thermalEnergy(potential.temperature)
  const { coordinates, energies } = curvePoints(potential)
  const least = energies.reduce((lowest, energy) => Math.min(lowest, energy), Infinity)
  const heights = energies.map((energy) => (energy - least) / kT)
  const deviations = coordinates.map((coordinate) => deviationAt(potential, coordinate) / kT)
  const visited = visitedPlaces(coordinates, edges, weights)
  const top = heights.reduce((best, height, point) => {
    return visited[point] && (best < 0 || height > heights[best]) ? point : best
  }, -1)
  const turnCells = weights.length + (2 * Math.PI - (edges[weights.length] - edges[0]) > 1e-9 ? 1 : 0)
  const range = independentSamples === null ? null : amplitudeRange(heights, deviations, independentSamples)
  return {
    amplitude: heights[top],
    amplitudeDeviation: Number.isNaN(deviations[top]) ? null : deviations[top],
    amplitudeRange: range,
    divergence: curveFlatDivergence((angle) => potentialEnergy(potential, angle) / kT),
    divergenceBinned: binnedFlatDivergence(weights, edges),
    divergenceByChance:
      independentSamples === null ? null : flatDivergenceByChance(turnCells, independentSamples),
    likelihoodRatio:
      independentSamples === null ? null : flatLikelihoodRatio(weights, edges, independentSamples),
    independentSamples,
    flatBelow,
    ...judged(range, flatBelow),
  }
}

function checkInput(kind: Inversion['kind'], flatBelow: number): void {
  if (kind !== 'dihedral') {
    throw new InvalidInputError('SETTING_INVALID', `Flatness is asked of a dihedral, not of a ${kind}.`, {
      field: 'kind',
    })
  }
  if (flatBelow > 0 && Number.isFinite(flatBelow)) return
  throw new InvalidInputError('SETTING_INVALID', `The threshold is ${flatBelow} kT; it must be above 0.`, {
    field: 'flatBelow',
  })
}

/** Which places lie in a bin that holds data, the end of its last bin included. */
function visitedPlaces(coordinates: Float64Array, edges: Float64Array, weights: Float64Array): boolean[] {
  return Array.from(coordinates, (coordinate) => {
    const above = edges.findIndex((edge) => edge > coordinate)
    const bin = above < 0 ? weights.length - 1 : above - 1
    return bin >= 0 && coordinate <= edges[bin + 1] && weights[bin] > 0
  })
}

/** A place without a band may be as low as the others and as high as it likes. */
function amplitudeRange(heights: Float64Array, deviations: Float64Array, samples: number): [number, number] {
  let low = 0
  let high = 2 * FLAT_DEVIATIONS * Math.sqrt(2 / samples)
  heights.forEach((height, point) => {
    const margin = FLAT_DEVIATIONS * (Number.isNaN(deviations[point]) ? Infinity : deviations[point])
    low = Math.max(low, height - margin)
    high = Math.max(high, height + margin)
  })
  return [low, high]
}

function judged(
  range: readonly [number, number] | null,
  flatBelow: number,
): Pick<DihedralFlatness, 'verdict' | 'doubt'> {
  if (range === null) return { verdict: 'undecided', doubt: 'SAMPLE_SIZE_UNKNOWN' }
  if (range[1] < flatBelow) return { verdict: 'flat', doubt: null }
  if (range[0] >= flatBelow) return { verdict: 'keep', doubt: null }
  return { verdict: 'undecided', doubt: 'BAND_TOO_WIDE' }
}
