import type { LambdaSearch, LambdaTrial } from './lambda-search'

const LOG_TOLERANCE = 0.003
const MOST_TRIALS = 60
/** Steps of the bracket in log₁₀ λ: the first is at least this long, none longer than twice the one before or 2. */
const FIRST_STEP = 1
const LONGEST_STEP = 2
/** Pulls beyond this say no more than their sign. */
const LARGEST_PULL = 5
/** A new search that begins beside its answer takes no longer steps than this. */
const LONGEST_CORRECTION = 0.5
const MOST_CORRECTIONS = 5

/** Where a search ended: log₁₀ λ of the fixed point, with the fit of the nearest trial. */
export interface LikelihoodChoice extends LambdaTrial {
  /** Derivative of the pull there, null at an end of the range. */
  readonly slope: number | null
}

/**
 * Chooses λ by marginal likelihood: the fixed point of the Fellner–Schall update λ ← (ED − d)/|Dβ|², with d the dimension
 * the penalty does not see (Wood & Fasiolo, Biometrics 73 (2017) 1071). Plain repetition of the update creeps; here the
 * pull, the move in log₁₀ λ that the update asks for, is bracketed and brought to zero by the Illinois rule. Exactly
 * harmonic or flat data have no finite fixed point: the search ends where the effective dimension stops falling.
 *
 * @param before where a search on nearly the same data ended, or null
 */
export function lambdaByLikelihood(search: LambdaSearch, before: LikelihoodChoice | null): LikelihoodChoice {
  return (before && correct(search, before)) ?? bracket(search, before)
}

function bracket(search: LambdaSearch, from: LambdaTrial | null): LikelihoodChoice {
  let here = search.tryAt(from?.log10Lambda ?? search.first, from)
  const upwards = pullOf(here, search) > 0
  const bound = upwards ? search.high : search.low
  for (let step = FIRST_STEP; ; step *= 2) {
    if (here.log10Lambda === bound || (here.stiff && upwards)) {
      return { ...here, slope: null }
    }
    const size = Math.max(step, Math.min(Math.abs(pullOf(here, search)), LONGEST_STEP))
    const next = search.tryAt(here.log10Lambda + (upwards ? size : -size), here)
    if (pullOf(next, search) > 0 !== upwards) return illinois(search, here, next)
    here = next
  }
}

/** Regula falsi with the Illinois rule between two trials whose pulls differ in sign. */
function illinois(search: LambdaSearch, one: LambdaTrial, two: LambdaTrial): LikelihoodChoice {
  let [kept, last] = [one, two]
  let keptPull = pullOf(kept, search)
  for (let trial = 0; ; trial++) {
    const lastPull = pullOf(last, search)
    const span = kept.log10Lambda - last.log10Lambda
    const move = (-lastPull * span) / (keptPull - lastPull)
    if (Math.abs(move) < LOG_TOLERANCE || Math.abs(span) < LOG_TOLERANCE || trial === MOST_TRIALS) {
      const slope = (pullOf(kept, search) - lastPull) / span
      return { ...last, log10Lambda: last.log10Lambda + move, slope }
    }
    const next = search.tryAt(last.log10Lambda + move, last)
    if (pullOf(next, search) > 0 === lastPull > 0) keptPull /= 2
    else [kept, keptPull] = [last, lastPull]
    last = next
  }
}

/** Secant steps from an earlier answer; null where they do not settle. */
function correct(search: LambdaSearch, before: LikelihoodChoice): LikelihoodChoice | null {
  let here = search.tryAt(before.log10Lambda, before)
  let { slope } = before
  if (slope === null) {
    const stays = here.stiff && pullOf(here, search) > 0
    return stays ? { ...here, slope: null } : null
  }
  for (let trial = 0; trial < MOST_CORRECTIONS; trial++) {
    const pull = pullOf(here, search)
    const move = -pull / slope
    if (!(slope < 0 && Math.abs(move) < LONGEST_CORRECTION)) return null
    if (Math.abs(move) < LOG_TOLERANCE) return { ...here, log10Lambda: here.log10Lambda + move, slope }
    const next = search.tryAt(here.log10Lambda + move, here)
    slope = (pullOf(next, search) - pull) / (next.log10Lambda - here.log10Lambda)
    here = next
  }
  return null
}

function pullOf({ fit, excess, log10Lambda }: LambdaTrial, { lambdaScale }: LambdaSearch): number {
  // Rounding may put the dimension below its limit: then the curve is as stiff as it gets.
  const update = excess > 0 ? Math.log10(excess / fit.roughness / lambdaScale) : Infinity
  return Math.min(Math.max(update - log10Lambda, -LARGEST_PULL), LARGEST_PULL)
}
