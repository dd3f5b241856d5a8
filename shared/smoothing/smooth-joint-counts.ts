import { bandedSolve } from '../numeric'
import type { BinGeometry } from './effective-volumes'
import { jointLogEffectiveVolumes, jointLogVolumes } from './joint-effective-volumes'
import { jointLambdaByAic } from './joint-lambda-by-aic'
import { jointLambdaByLikelihood } from './joint-lambda-by-likelihood'
import { coefficientLambdas, jointLambdaSearch } from './joint-lambda-search'
import { HOLD } from './smooth-counts'
import { tensorAxis } from './tensor-axis'
import { type TensorFit, tensorFit } from './tensor-fit'
import type { PerAxis } from './tensor-penalty'
import { tensorProject, tensorValues } from './tensor-products'
import { tensorSystem, type TensorSystem } from './tensor-system'

/** Searches for λ, each with effective volumes from the one before; the first has the exact volumes. */
const SEARCHES = 3
/** Fits with the final λ, each with effective volumes from the fit before. */
const REFITS = 3

/** How both λ are chosen, or the λ to take. */
export type JointLambdaChoice =
  { readonly by: 'likelihood' | 'aic' } | { readonly log10Lambdas: PerAxis<number> }

/** Cubic B-splines on equal segments along one axis. */
export interface SplineAxis {
  /** Where the first segment begins, nm or rad. */
  readonly low: number
  /** Width of a segment. */
  readonly segment: number
  /** Number of coefficients; on a circle also of segments, otherwise three more than segments. */
  readonly size: number
  readonly periodic: boolean
}

/** A smooth log-density of a joint histogram. */
export interface SmoothJointDensity {
  readonly axes: PerAxis<SplineAxis>
  /** Of η, index ix · size_y + iy. */
  readonly coefficients: Float64Array
  /** η at the cell midpoints, row-major as the counts: the expected count of a cell is ∫∫ J exp(η) dq. */
  readonly eta: Float64Array
  /** Expected counts. */
  readonly means: Float64Array
  /** Standard deviation of η − η(m) at the cell midpoints, with m the cell of largest η. */
  readonly deviations: Float64Array
  /** Expected counts that each coefficient speaks for, B_x′ μ B_y: where they are few, only the penalty does. */
  readonly support: Float64Array
  /** Per bin index along each axis; rounded to 0.01. */
  readonly log10Lambdas: PerAxis<number>
  readonly effectiveDimension: number
}

/**
 * Smooths a joint histogram: a penalised Poisson fit of its log-density by tensor products of cubic B-splines (Eilers &
 * Marx, Stat. Sci. 11 (1996) 89; in array form Eilers, Currie, Durbán, Comput. Stat. Data Anal. 50 (2006) 61), with the exact
 * effective volume of each cell as offset, one λ per axis, chosen or given, and the posterior deviation of differences from
 * the most likely place. Empty cells need no special case. It costs cells times coefficients a side, and a banded factor.
 *
 * @param x geometry of the first axis, at least 5 bins; for a dihedral they fill the turn
 * @param counts effective counts (divided by the statistical inefficiency), row-major, index ix · ny + iy
 * @throws {InvalidInputError} SINGULAR_SYSTEM when the counts do not determine a surface
 */
export function smoothJointCounts(
  x: BinGeometry,
  y: BinGeometry,
  counts: Float64Array,
  choice: JointLambdaChoice,
): SmoothJointDensity {
  const axes = [tensorAxis(x), tensorAxis(y)] as const
  const system = tensorSystem(...axes, { strength: HOLD, level: meanLevel(x, y, counts) })
  const exact = jointLogVolumes(...axes)
  const offsetsUnder = jointLogEffectiveVolumes(...axes)
  const start = startingPoint(system, counts, exact, offsetsUnder, choice)
  const log10Lambdas: PerAxis<number> = [rounded(start.logs[0]), rounded(start.logs[1])]
  const lambdas = coefficientLambdas(system, counts, log10Lambdas)
  let fit = start.fit ?? tensorFit(system, counts, exact, lambdas, null)
  for (let pass = 0; pass < REFITS; pass++) {
    fit = tensorFit(system, counts, offsetsUnder(fit.coefficients), lambdas, fit.coefficients)
  }
  return {
    axes: [splineAxis(system.x), splineAxis(system.y)],
    coefficients: fit.coefficients,
    eta: fit.eta,
    means: fit.means,
    deviations: deviationsFromMode(system, fit),
    support: tensorProject(system.x.basis, system.y.basis, fit.means),
    log10Lambdas,
    effectiveDimension: fit.effectiveDimension,
  }
}

const rounded = (log10Lambda: number) => Math.round(log10Lambda * 100) / 100

/** ln of all counts over all volume. */
function meanLevel(x: BinGeometry, y: BinGeometry, counts: Float64Array): number {
  const sum = (values: Float64Array) => values.reduce((total, value) => total + value, 0)
  return Math.log(sum(counts)) - Math.log(sum(x.volumes)) - Math.log(sum(y.volumes))
}

/** Looks for both λ a few times, each time with the effective volumes of the surface found before. */
function startingPoint(
  system: TensorSystem,
  counts: Float64Array,
  exact: Float64Array,
  offsetsUnder: (coefficients: Float64Array) => Float64Array,
  choice: JointLambdaChoice,
): { readonly logs: PerAxis<number>; readonly fit: TensorFit | null } {
  if ('log10Lambdas' in choice) return { logs: choice.log10Lambdas, fit: null }
  const look = choice.by === 'aic' ? jointLambdaByAic : jointLambdaByLikelihood
  let found = look(jointLambdaSearch(system, counts, exact), null)
  for (let pass = 1; pass < SEARCHES; pass++) {
    found = look(jointLambdaSearch(system, counts, offsetsUnder(found.fit.coefficients)), found)
  }
  return found
}

function splineAxis({ low, segment, basis }: TensorSystem['x']): SplineAxis {
  return { low, segment, size: basis.size, periodic: basis.periodic }
}

/** sd(η_i − η_k) = √(S_ii + S_kk − 2 S_ik), with the column S·_k from one solve. */
function deviationsFromMode(
  { x, y, places }: TensorSystem,
  { eta, variances, factor }: TensorFit,
): Float64Array {
  const mode = eta.indexOf(eta.reduce((most, value) => Math.max(most, value), -Infinity))
  const unit = new Float64Array(eta.length)
  unit[mode] = 1
  const pull = tensorProject(x.basis, y.basis, unit)
  const right = new Float64Array(pull.length)
  pull.forEach((value, index) => (right[places[index]] = value))
  const solved = bandedSolve(factor, right)
  const column = tensorValues(
    x.basis,
    y.basis,
    pull.map((_, index) => solved[places[index]]),
  )
  // Differences of nearly equal variances may round below zero next to the mode.
  return eta.map((_, cell) => Math.sqrt(Math.max(0, variances[cell] + variances[mode] - 2 * column[cell])))
}
