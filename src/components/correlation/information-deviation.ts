import type { Correlation } from '@shared/correlation'

/** 99th percentile of a normal distribution in standard deviations. */
const NORMAL_99 = 2.326348

/**
 * Standard deviation of the mutual information behind a verdict, in nats: to first order in the cell probabilities,
 * var I = (Σ p ln²[p/(pₓp_y)] − I²) / N (Roulston, Physica D 125 (1999) 285), and, since that vanishes for unrelated terms,
 * the scatter of the null tables beside it. Null when the number of independent samples is unknown.
 */
export function informationDeviation(correlation: Correlation): number | null {
  const { independentSamples, nullMean, nullPercentile99, verdictGrid } = correlation
  if (independentSamples === null || nullMean === null || nullPercentile99 === null) return null
  const { masses, xEdges, yEdges } = verdictGrid
  const nx = xEdges.length - 1
  const ny = yEdges.length - 1
  const ofX = new Float64Array(nx)
  const ofY = new Float64Array(ny)
  masses.forEach((mass, index) => {
    ofX[Math.floor(index / ny)] += mass
    ofY[index % ny] += mass
  })
  let first = 0
  let second = 0
  masses.forEach((mass, index) => {
    if (mass === 0) return
    const information = Math.log(mass / (ofX[Math.floor(index / ny)] * ofY[index % ny]))
    first += mass * information
    second += mass * information * information
  })
  const scatter = (nullPercentile99 - nullMean) / NORMAL_99
  return Math.sqrt(Math.max(0, second - first * first) / independentSamples + scatter * scatter)
}
