import { jointLambdaByLikelihood, type JointLikelihoodChoice } from './joint-lambda-by-likelihood'
import type { JointLambdaSearch, JointLambdaTrial } from './joint-lambda-search'

const FIRST_STEP = 0.64
/** Between two searches on nearly the same data the answer moves little. */
const NEXT_STEP = 0.04
/** The criterion is so flat at its least that finer steps would only follow its ripples. */
const LAST_STEP = 0.01
const MOVES = [
  [1, 0],
  [-1, 0],
  [0, 1],
  [0, -1],
] as const

/** Where a search ended: as a likelihood search, so that both can be repeated from their answer. */
export type JointAicChoice = JointLikelihoodChoice

/**
 * Chooses both λ by Akaike's criterion, deviance + 2 ED: from the answer of the marginal likelihood it goes to the best of
 * the four neighbours in log₁₀ λ while one is better, then halves the step, down to 0.02.
 *
 * @param before where a search on nearly the same data ended, or null
 */
export function jointLambdaByAic(search: JointLambdaSearch, before: JointAicChoice | null): JointAicChoice {
  const from = before ?? jointLambdaByLikelihood(search, null)
  let best = search.tryAt(from.logs, from)
  for (let step = before === null ? FIRST_STEP : NEXT_STEP; step > LAST_STEP;) {
    const centre = best
    for (const [alongX, alongY] of MOVES) {
      const logs = [centre.logs[0] + alongX * step, centre.logs[1] + alongY * step] as const
      const trial = search.tryAt(logs, centre)
      if (akaike(trial) < akaike(best) - 1e-6) best = trial
    }
    if (best === centre) step /= 2
  }
  return { ...best, slopes: from.slopes }
}

function akaike({ fit }: JointLambdaTrial): number {
  return fit.deviance + 2 * fit.effectiveDimension
}
