import { type PenalisedFit, penalisedFit } from './penalised-fit'
import type { PenalisedSystem } from './penalised-system'
import { penaltyNullity } from './smoothing-basis'

/** λ beside the mean expected count per coefficient that no histogram needs: the curve is stiff long before. */
const STIFFEST = 1e18
const SOFTEST_LOG = -6
/** A curve this close to the stiff limit in effective dimension is there: more λ moves nothing. */
const STIFF_DIMENSION = 0.02
const LOG_TOLERANCE = 0.003
const MOST_EVALUATIONS = 60
const AIC_STEP = 0.5

/** A fit with the λ it was made with. */
export interface ChosenFit {
  readonly log10Lambda: number
  readonly fit: PenalisedFit
}

/** log₁₀ of the largest λ per bin index that is tried. */
function stiffestLog(system: PenalisedSystem, counts: Float64Array): number {
  const total = counts.reduce((sum, count) => sum + count, 0)
  return Math.log10((STIFFEST * total) / system.basis.size / system.basis.lambdaScale)
}

/**
 * Chooses λ by marginal likelihood: the fixed point of the Fellner–Schall update λ ← (ED − d)/|Dβ|², with d the dimension
 * the penalty does not see (Wood & Fasiolo, Biometrics 73 (2017) 1071), found by bracketing and the Illinois rule in
 * log λ. Exactly harmonic or flat data have no finite fixed point: the search ends at the stiff limit, where the
 * effective dimension stops falling.
 *
 * @param start fit to start from, or null
 */
export function lambdaByLikelihood(
  system: PenalisedSystem,
  counts: Float64Array,
  volumes: Float64Array,
  start: ChosenFit | null,
): ChosenFit {
  const nullity = penaltyNullity(system.basis)
  const highest = stiffestLog(system, counts)
  const tryAt = (log10Lambda: number, from: ChosenFit | null): Trial => {
    const fit = penalisedFit(system, counts, volumes, 10 ** log10Lambda, from?.fit.coefficients ?? null)
    const excess = fit.effectiveDimension - nullity
    // Rounding may put the dimension below its limit: then the curve is as stiff as it gets.
    const update = excess > 0 ? Math.log10(excess / fit.roughness / system.basis.lambdaScale) : Infinity
    return { log10Lambda, fit, pull: update - log10Lambda, stiff: excess < STIFF_DIMENSION }
  }
  let here = tryAt(clip(start?.log10Lambda ?? firstLog(counts), SOFTEST_LOG, highest), start)
  const towards = here.pull > 0 ? 1 : -1
  const bound = towards > 0 ? highest : SOFTEST_LOG
  for (let least = start === null ? 1 : 0.1; ; least *= 2) {
    if (here.log10Lambda === bound || (here.stiff && towards > 0)) return here
    const size = clip(Math.abs(here.pull), least, Math.max(least, 2))
    const next = tryAt(clip(here.log10Lambda + towards * size, SOFTEST_LOG, highest), here)
    if (next.pull > 0 !== towards > 0) return illinois(here, next, tryAt)
    here = next
  }
}

interface Trial extends ChosenFit {
  /** How far, in log₁₀ λ, the update would move. */
  readonly pull: number
  readonly stiff: boolean
}

/** Regula falsi with the Illinois rule between two trials whose pulls differ in sign. */
function illinois(one: Trial, two: Trial, tryAt: (log10Lambda: number, from: ChosenFit) => Trial): ChosenFit {
  let [kept, last] = [one, two]
  let keptPull = bounded(kept.pull)
  for (let evaluation = 0; evaluation < MOST_EVALUATIONS; evaluation++) {
    const lastPull = bounded(last.pull)
    const span = kept.log10Lambda - last.log10Lambda
    const move = (-lastPull * span) / (keptPull - lastPull)
    if (Math.abs(move) < LOG_TOLERANCE || Math.abs(span) < LOG_TOLERANCE) break
    const next = tryAt(last.log10Lambda + move, last)
    if (next.pull > 0 === last.pull > 0) keptPull /= 2
    else [kept, keptPull] = [last, lastPull]
    last = next
  }
  return last
}

/**
 * Chooses λ by Akaike's criterion, deviance + 2 ED: a scan in steps of half a decade from the stiff end, then a parabola
 * through the best three points, then steps of a hundredth.
 */
export function lambdaByAic(
  system: PenalisedSystem,
  counts: Float64Array,
  volumes: Float64Array,
  start: ChosenFit | null,
): ChosenFit {
  const highest = stiffestLog(system, counts)
  const tryAt = (log10Lambda: number, from: ChosenFit | null): ChosenFit => ({
    log10Lambda,
    fit: penalisedFit(system, counts, volumes, 10 ** log10Lambda, from?.fit.coefficients ?? null),
  })
  const nullity = penaltyNullity(system.basis)
  let best =
    start === null ? scan(tryAt, firstLog(counts), highest, nullity) : tryAt(start.log10Lambda, start)
  for (let step = AIC_STEP / 2; step > LOG_TOLERANCE; step /= 2) {
    const low = tryAt(Math.max(best.log10Lambda - step, SOFTEST_LOG), best)
    const high = tryAt(Math.min(best.log10Lambda + step, highest), best)
    best = lesser(lesser(best, low), high)
  }
  return best
}

function scan(
  tryAt: (log10Lambda: number, from: ChosenFit | null) => ChosenFit,
  first: number,
  highest: number,
  nullity: number,
): ChosenFit {
  let best = tryAt(Math.min(first, highest), null)
  for (const towards of [1, -1]) {
    let here = best
    for (;;) {
      const target = here.log10Lambda + towards * AIC_STEP
      const stiff = here.fit.effectiveDimension - nullity < STIFF_DIMENSION
      if (target > highest || target < SOFTEST_LOG || (stiff && towards > 0)) break
      here = tryAt(target, here)
      best = lesser(best, here)
      // Local ripples are passed; a criterion this much above the best does not come back.
      if (akaike(here) > akaike(best) + 20) break
    }
  }
  return best
}

function akaike({ fit }: ChosenFit): number {
  return fit.deviance + 2 * fit.effectiveDimension
}

/** The trial with the smaller criterion; ties within rounding go to the first. */
function lesser(one: ChosenFit, other: ChosenFit): ChosenFit {
  return akaike(other) < akaike(one) - 1e-6 ? other : one
}

/** Where a first look at λ is worth it: a curve of a dozen or so effective parameters. */
function firstLog(counts: Float64Array): number {
  const total = counts.reduce((sum, count) => sum + count, 0)
  return Math.log10(total / counts.length) + 6 * Math.log10(counts.length / 40)
}

function bounded(pull: number): number {
  return Math.sign(pull) * Math.min(Math.abs(pull), 5)
}

function clip(value: number, low: number, high: number): number {
  return Math.min(Math.max(value, low), high)
}
