import { bandedSolve } from '../numeric'
import { type ChosenFit, lambdaByAic, lambdaByLikelihood, stiffestLog } from './choose-lambda'
import { type BinGeometry, effectiveVolumes } from './effective-volumes'
import { identityBasis } from './identity-basis'
import { penalisedFit } from './penalised-fit'
import { binValues, penalisedSystem, type PenalisedSystem, projectBins } from './penalised-system'
import { splineBasis } from './spline-basis'

/** Most bins that are smoothed one coefficient each. */
export const IDENTITY_BINS = 400
const SPLINE_COEFFICIENTS = 200
/** Searches for λ, each with effective volumes from the one before; the first has the exact volumes. */
const SEARCHES = 3
/** Fits with the final λ, each with effective volumes from the fit before. */
const FINAL_FITS = 2

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
  /** True when λ is as large as doubles allow, and smaller than asked for or still pulled upwards. */
  readonly atLimit: boolean
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
  const system = penalisedSystem(chooseBasis(geometry))
  const volumesUnder = effectiveVolumes(geometry)
  const limit = Math.floor(stiffestLog(system, counts) * 100) / 100
  let chosen: ChosenFit | null = null
  let volumes = geometry.volumes
  if ('by' in choice) {
    const search = choice.by === 'aic' ? lambdaByAic : lambdaByLikelihood
    for (let pass = 0; pass < SEARCHES; pass++) {
      chosen = search(system, counts, volumes, chosen)
      volumes = volumesUnder(chosen.fit.eta)
    }
  }
  const wanted = 'by' in choice ? (chosen?.log10Lambda ?? limit) : choice.log10Lambda
  const log10Lambda = Math.min(Math.round(wanted * 100) / 100, limit)
  const refine = (start: Float64Array | null) =>
    penalisedFit(system, counts, volumes, 10 ** log10Lambda, start)
  let fit = refine(chosen?.fit.coefficients ?? null)
  for (let pass = 0; pass < ('by' in choice ? FINAL_FITS : FINAL_FITS + SEARCHES) - 1; pass++) {
    volumes = volumesUnder(fit.eta)
    fit = refine(fit.coefficients)
  }
  return {
    eta: fit.eta,
    means: fit.means,
    deviations: deviationsFromMode(system, fit),
    log10Lambda,
    effectiveDimension: fit.effectiveDimension,
    atLimit: Math.round(wanted * 100) / 100 > limit,
  }
}

function chooseBasis({ midpoints, edges, period }: BinGeometry) {
  if (midpoints.length <= IDENTITY_BINS) return identityBasis(midpoints, period)
  return splineBasis(midpoints, edges[0], edges[edges.length - 1], period !== null, SPLINE_COEFFICIENTS)
}

/** sd(η_i − η_k) = √(S_ii + S_kk − 2 S_ik), with the column S·_k from one solve. */
function deviationsFromMode(
  system: PenalisedSystem,
  { eta, variances, factor }: ReturnType<typeof penalisedFit>,
): Float64Array {
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
  // Differences of nearly equal variances may round below zero next to the mode.
  return eta.map((_, bin) => Math.sqrt(Math.max(0, variances[bin] + variances[mode] - 2 * column[bin])))
}
