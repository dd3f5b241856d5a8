import type { Correlation } from './correlation'
import { marginalsOf } from './mutual-information'

/** 99th percentile of a normal distribution in standard deviations. */
const NORMAL_99 = 2.326348

/**
 * Standard deviation of the corrected mutual information, in nats: to first order in the cell probabilities,
 * var I = (Σ p ln²[p/(p₁p₂)] − I²)/N on the verdict grid (Roulston, Physica D 125 (1999) 285), and, since that vanishes for
 * unrelated terms, the scatter of the null tables beside it. At 2,000 samples it is good to some 20 %.
 *
 * @returns null when the number of independent samples is unknown
 */
export function informationDeviation({
  independentSamples,
  nullMean,
  nullPercentile99,
  verdictGrid: { masses, yEdges },
}: Correlation): number | null {
  if (independentSamples === null || nullMean === null || nullPercentile99 === null) return null
  const ny = yEdges.length - 1
  const { x, y } = marginalsOf(masses, ny)
  let first = 0
  let second = 0
  masses.forEach((mass, cell) => {
    if (mass === 0) return
    const information = Math.log(mass / (x[Math.floor(cell / ny)] * y[cell % ny]))
    first += mass * information
    second += mass * information * information
  })
  const scatter = (nullPercentile99 - nullMean) / NORMAL_99
  return Math.hypot(Math.sqrt(Math.max(0, second - first * first) / independentSamples), scatter)
}
