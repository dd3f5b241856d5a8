/** Terms of the series or the fraction that stop being added below this share of the sum. */
const NEGLIGIBLE = 1e-16
/** Never reached: both converge within some √a terms about x = a. */
const MOST_TERMS = 100_000

const HALF_LOG_TWO_PI = 0.5 * Math.log(2 * Math.PI)

/** Below this Stirling's series is not good enough and the recursion ln Γ(a) = ln Γ(a + 1) − ln a is taken. */
const STIRLING_FROM = 20

/**
 * Probability that a chi-square number exceeds a value: the regularised upper incomplete gamma function Q(k/2, x/2), by its
 * series below x/2 = k/2 + 1 and by a continued fraction above (Abramowitz & Stegun, Handbook of Mathematical Functions, 1964,
 * 6.5.29 and 6.5.31; the fraction evaluated by the method of Lentz, Appl. Opt. 15 (1976) 668; numbers from memory).
 *
 * @param x at least 0
 * @param freedom degrees of freedom, above 0
 * @returns in [0, 1], to about 1e-12 of itself where it does not underflow; 1 for x = 0
 * @example chiSquareSurvival(2, 2) // 1/e
 */
export function chiSquareSurvival(x: number, freedom: number): number {
  const [shape, at] = [freedom / 2, x / 2]
  if (at <= 0) return 1
  const front = Math.exp(shape * Math.log(at) - at - logGamma(shape))
  return at < shape + 1 ? 1 - front * lowerSeries(shape, at) : front * upperFraction(shape, at)
}

/** Σ x^n / (a (a + 1) … (a + n)) */
function lowerSeries(shape: number, x: number): number {
  let term = 1 / shape
  let sum = term
  for (let n = 1; n < MOST_TERMS && term > NEGLIGIBLE * sum; n++) {
    term *= x / (shape + n)
    sum += term
  }
  return sum
}

/** 1/(x + 1 − a − 1(1 − a)/(x + 3 − a − 2(2 − a)/(x + 5 − a − …))) */
function upperFraction(shape: number, x: number): number {
  let denominator = x + 1 - shape
  let below = 1 / denominator
  let above = Infinity
  let value = below
  for (let n = 1; n < MOST_TERMS; n++) {
    const numerator = -n * (n - shape)
    denominator += 2
    below = 1 / (denominator + numerator * below)
    above = denominator + numerator / above
    const factor = below * above
    value *= factor
    if (Math.abs(factor - 1) < NEGLIGIBLE * 10) break
  }
  return value
}

function logGamma(a: number): number {
  let shift = 0
  let at = a
  for (; at < STIRLING_FROM; at++) shift += Math.log(at)
  const inverse = 1 / at
  const square = inverse * inverse
  const series = inverse * (1 / 12 - square * (1 / 360 - square * (1 / 1260 - square / 1680)))
  return (at - 0.5) * Math.log(at) - at + HALF_LOG_TWO_PI + series - shift
}
