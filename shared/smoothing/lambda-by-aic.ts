import type { LambdaSearch, LambdaTrial } from './lambda-search'

const SCAN_STEP = 0.5
const LAST_STEP = 0.005
/** Local ripples of the criterion are passed; this much above the best it does not come back. */
const HOPELESS = 20

/**
 * Chooses λ by Akaike's criterion, deviance + 2 ED: a scan in half decades both ways, then halved steps around the best
 * down to 0.005 in log₁₀ λ.
 *
 * @param before where a search on nearly the same data ended, or null
 */
export function lambdaByAic(search: LambdaSearch, before: LambdaTrial | null): LambdaTrial {
  let best = before === null ? scan(search) : search.tryAt(before.log10Lambda, before)
  for (let step = SCAN_STEP / 2; step > LAST_STEP; step /= 2) {
    const lower = search.tryAt(best.log10Lambda - step, best)
    const higher = search.tryAt(best.log10Lambda + step, best)
    best = lesser(lesser(best, lower), higher)
  }
  return best
}

function scan(search: LambdaSearch): LambdaTrial {
  const first = search.tryAt(search.first, null)
  let best = first
  for (const step of [SCAN_STEP, -SCAN_STEP]) {
    let here = first
    while (here.log10Lambda !== (step > 0 ? search.high : search.low) && !(here.stiff && step > 0)) {
      here = search.tryAt(here.log10Lambda + step, here)
      best = lesser(best, here)
      if (akaike(here) > akaike(best) + HOPELESS) break
    }
  }
  return best
}

function akaike({ fit }: LambdaTrial): number {
  return fit.deviance + 2 * fit.effectiveDimension
}

/** The trial with the smaller criterion; ties within rounding go to the first. */
function lesser(one: LambdaTrial, other: LambdaTrial): LambdaTrial {
  return akaike(other) < akaike(one) - 1e-6 ? other : one
}
