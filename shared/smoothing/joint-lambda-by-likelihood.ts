import type { JointLambdaSearch, JointLambdaTrial } from './joint-lambda-search'
import type { PerAxis } from './tensor-penalty'

const LOG_TOLERANCE = 0.003
const MOST_TRIALS = 60
/** No step is longer than this, in log₁₀ λ. */
const LONGEST_STEP = 1.5
/** Pulls beyond this say no more than their sign. */
const LARGEST_PULL = 5

/** Derivatives of both pulls by both log₁₀ λ: [∂x/∂x, ∂x/∂y, ∂y/∂x, ∂y/∂y]. */
type Slopes = readonly [number, number, number, number]

/** Where a search ended, with the slopes of the pulls it learnt. */
export interface JointLikelihoodChoice extends JointLambdaTrial {
  readonly slopes: Slopes
}

/** The update by itself: each λ moves by its own pull. */
const UPDATE_ONLY: Slopes = [-1, 0, 0, -1]

/**
 * Chooses both λ by marginal likelihood: the fixed point of the generalised Fellner–Schall update
 * λ_m ← λ_m [tr(S⁻S_m) − tr(H⁻¹S_m)] / (β′S_mβ) for the two overlapping penalties S = λx Sx + λy Sy (Wood & Fasiolo,
 * Biometrics 73 (2017) 1071). Plain repetition creeps; here the pulls, the moves in log₁₀ λ that the update asks for, are
 * brought to zero by Broyden's method. An axis along which the data are exactly quadratic or flat has no finite fixed point:
 * it rests where its effective parameters are used up.
 *
 * @param before where a search on nearly the same data ended, or null
 */
export function jointLambdaByLikelihood(
  search: JointLambdaSearch,
  before: JointLikelihoodChoice | null,
): JointLikelihoodChoice {
  let here = search.tryAt(before?.logs ?? search.first, before)
  let slopes = before?.slopes ?? UPDATE_ONLY
  for (let trial = 0; ; trial++) {
    const pulls = pullsOf(here, search)
    const step = newtonStep(slopes, pulls)
    if (trial === MOST_TRIALS || step.every((move) => Math.abs(move) < LOG_TOLERANCE)) {
      return { ...here, logs: [here.logs[0] + step[0], here.logs[1] + step[1]], slopes }
    }
    const next = search.tryAt([here.logs[0] + step[0], here.logs[1] + step[1]], here)
    slopes = broyden(slopes, here, next, pulls, pullsOf(next, search))
    here = next
  }
}

/** Moves in log₁₀ λ that the update asks for; none where an axis rests at an end of its range or is stiff and would stiffen. */
function pullsOf({ fit, logs, stiff }: JointLambdaTrial, search: JointLambdaSearch): [number, number] {
  const along = (axis: 0 | 1) => {
    // Rounding may put the parameters below zero: then the surface is as stiff as it gets.
    const excess = fit.excesses[axis]
    const update = excess > 0 ? Math.log10(excess / fit.roughnesses[axis] / search.scales[axis]) : Infinity
    const pull = Math.min(Math.max(update - logs[axis], -LARGEST_PULL), LARGEST_PULL)
    const rests = pull > 0 ? stiff[axis] : logs[axis] <= search.low
    return rests ? 0 : pull
  }
  return [along(0), along(1)]
}

/**
 * Solves slopes · step = −pulls. An axis at rest stays, and the other goes by its own slope; a step against the pulls, or
 * without a slope to go by, follows the update instead.
 */
function newtonStep([xx, xy, yx, yy]: Slopes, pulls: PerAxis<number>): [number, number] {
  const [px, py] = pulls
  const coupled = px !== 0 && py !== 0
  const determinant = coupled ? xx * yy - xy * yx : xx * yy
  const [alongX, alongY] = coupled
    ? [(xy * py - yy * px) / determinant, (yx * px - xx * py) / determinant]
    : [px === 0 ? 0 : -px / xx, py === 0 ? 0 : -py / yy]
  const agrees = coupled ? determinant > 0 && alongX * px + alongY * py >= 0 : alongX * px + alongY * py > 0
  const [x, y] = agrees ? [alongX, alongY] : pulls
  const shorten = Math.min(1, LONGEST_STEP / Math.max(Math.abs(x), Math.abs(y)))
  return [x * shorten, y * shorten]
}

/** Broyden's rank-one correction of the slopes by what a step showed; an axis at rest took no step of its own. */
function broyden(
  slopes: Slopes,
  from: JointLambdaTrial,
  to: JointLambdaTrial,
  before: PerAxis<number>,
  after: PerAxis<number>,
): Slopes {
  const dx = before[0] === 0 ? 0 : to.logs[0] - from.logs[0]
  const dy = before[1] === 0 ? 0 : to.logs[1] - from.logs[1]
  const squared = dx * dx + dy * dy
  if (squared === 0) return slopes
  // What an axis gains or loses by coming to rest is no slope.
  const rested = (axis: 0 | 1) => (before[axis] === 0) !== (after[axis] === 0)
  const missX = rested(0) ? 0 : (after[0] - before[0] - slopes[0] * dx - slopes[1] * dy) / squared
  const missY = rested(1) ? 0 : (after[1] - before[1] - slopes[2] * dx - slopes[3] * dy) / squared
  return [slopes[0] + missX * dx, slopes[1] + missX * dy, slopes[2] + missY * dx, slopes[3] + missY * dy]
}
