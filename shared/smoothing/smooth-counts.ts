import { bandedSolve } from '../numeric'
import { lambdaByAic } from './lambda-by-aic'
import { lambdaByLikelihood } from './lambda-by-likelihood'
import { type LambdaSearch, lambdaSearch, type LambdaTrial } from './lambda-search'
import { type BinGeometry, logEffectiveVolumes } from './effective-volumes'
import { identityBasis } from './identity-basis'
import { type PenalisedFit, penalisedFit } from './penalised-fit'
import { binValues, penalisedSystem, type PenalisedSystem, projectBins } from './penalised-system'
import { splineBasis } from './spline-basis'

/** Most bins that are smoothed one coefficient each. */
export const IDENTITY_BINS = 400
const SPLINE_COEFFICIENTS = 200
/** Searches for λ, each with effective volumes from the one before; the first has the exact volumes. */
const SEARCHES = 3
/** Fits with the final λ, each with effective volumes from the fit before. */
const REFITS = 3

/**
 * A spring of this strength, in counts, holds each coefficient to the mean log-density. It is felt only where bins are empty
 * and the penalty too weak to guide the curve, which beside a wall would otherwise run off to a million kT.
 */
export const HOLD = 1e-8

/** How λ is chosen, or the λ to take. */
export type LambdaChoice = { readonly by: 'likelihood' | 'aic' } | { readonly log10Lambda: number }

/** A smooth log-density of a histogram. */
export interface SmoothDensity {
  /** η at the bin midpoints: the expected count of a bin is ∫ J exp(η) dq. */
  readonly eta: Float64Array
  /** Expected counts. */
  readonly means: Float64Array
  /** Standard deviation of η(m_i) − η(m_k) at the midpoints, with k the bin of largest η. */
  readonly deviations: Float64Array
  /** Per bin index; rounded to 0.01. */
  readonly log10Lambda: number
  readonly effectiveDimension: number
}

/**
 * Smooths a histogram: a penalised Poisson fit of its log-density with the exact effective volume of each bin as offset,
 * λ chosen or given, and the posterior deviation of differences from the most likely place.
 *
 * @param geometry at least 4 bins; for a dihedral they fill the turn
 * @param counts effective counts (divided by the statistical inefficiency), one per bin; at least 3 filled
 * @throws {InvalidInputError} SINGULAR_SYSTEM when the counts do not determine a curve
 */
export function smoothCounts(
  geometry: BinGeometry,
  counts: Float64Array,
  choice: LambdaChoice,
): SmoothDensity {
  const system = penalisedSystem(chooseBasis(geometry), {
    strength: HOLD,
    level: meanLevel(geometry, counts),
  })
  const offsetsUnder = logEffectiveVolumes(geometry)
  const start = startingPoint(system, counts, geometry, offsetsUnder, choice)
  const log10Lambda = Math.round(start.log10Lambda * 100) / 100
  const refit = (offsets: Float64Array, from: Float64Array | null) =>
    penalisedFit(system, counts, offsets, 10 ** log10Lambda, from)
  let fit = start.fit ?? refit(geometry.volumes.map(Math.log), null)
  for (let pass = 0; pass < REFITS; pass++) fit = refit(offsetsUnder(fit.eta), fit.coefficients)
  return {
    eta: fit.eta,
    means: fit.means,
    deviations: deviationsFromMode(system, fit),
    log10Lambda,
    effectiveDimension: fit.effectiveDimension,
  }
}

/** ln of all counts over all volume. */
function meanLevel({ volumes }: BinGeometry, counts: Float64Array): number {
  const sum = (values: Float64Array) => values.reduce((total, value) => total + value, 0)
  return Math.log(sum(counts) / sum(volumes))
}

function startingPoint(
  system: PenalisedSystem,
  counts: Float64Array,
  geometry: BinGeometry,
  offsetsUnder: (eta: Float64Array) => Float64Array,
  choice: LambdaChoice,
): { readonly log10Lambda: number; readonly fit: PenalisedFit | null } {
  if ('log10Lambda' in choice) return { log10Lambda: choice.log10Lambda, fit: null }
  return choice.by === 'aic'
    ? searchLambda(lambdaByAic, system, counts, geometry, offsetsUnder)
    : searchLambda(lambdaByLikelihood, system, counts, geometry, offsetsUnder)
}

/** Looks for λ a few times, each time with the effective volumes of the curve found before. */
function searchLambda<Found extends LambdaTrial>(
  look: (search: LambdaSearch, before: Found | null) => Found,
  system: PenalisedSystem,
  counts: Float64Array,
  { volumes }: BinGeometry,
  offsetsUnder: (eta: Float64Array) => Float64Array,
): LambdaTrial {
  let found = look(lambdaSearch(system, counts, volumes.map(Math.log)), null)
  for (let pass = 1; pass < SEARCHES; pass++) {
    found = look(lambdaSearch(system, counts, offsetsUnder(found.fit.eta)), found)
  }
  return found
}

function chooseBasis({ midpoints, edges, period, mirrored }: BinGeometry) {
  const [low, high] = [edges[0], edges[edges.length - 1]]
  if (midpoints.length <= IDENTITY_BINS) return identityBasis(midpoints, period, mirrored ? high : null)
  return splineBasis(midpoints, low, high, period !== null, SPLINE_COEFFICIENTS, mirrored)
}

/** sd(η_i − η_k) = √(S_ii + S_kk − 2 S_ik), with the column S·_k from one solve. */
function deviationsFromMode(system: PenalisedSystem, { eta, variances, factor }: PenalisedFit): Float64Array {
  const mode = eta.indexOf(eta.reduce((most, value) => Math.max(most, value), -Infinity))
  const unit = new Float64Array(eta.length)
  unit[mode] = 1
  const pull = projectBins(system.basis, unit)
  const right = new Float64Array(pull.length)
  pull.forEach((value, index) => (right[system.places[index]] = value))
  const solved = bandedSolve(factor, right)
  const column = binValues(
    system.basis,
    Float64Array.from(pull, (_, index) => solved[system.places[index]]),
  )
  // Differences of nearly equal variances may round below zero next to the mode, and off zero at it.
  return eta.map((_, bin) =>
    bin === mode ? 0 : Math.sqrt(Math.max(0, variances[bin] + variances[mode] - 2 * column[bin])),
  )
}
