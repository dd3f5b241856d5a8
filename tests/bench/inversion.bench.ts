import { expect, test } from 'vitest'
import { curveBasins } from '@shared/basins'
import type { Histogram } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert } from '@shared/inversion'
import { makeTable } from '@shared/tables'
import { BENCH_CASES, medianTime, noisyHistogram } from '../support/bench-cases'

const BINS = [90, 360, 1000, 5000]
const SAMPLES = 100_000
const WARM_UPS = 15
const RUNS = 41

function measure(histogram: Histogram): number {
  return medianTime(
    () => {
      const { potential } = invert(histogram, 400, DEFAULT_INVERSION_SETTINGS)
      curveBasins(potential)
      return makeTable(potential, DEFAULT_INVERSION_SETTINGS.table)
    },
    { warmUps: WARM_UPS, runs: RUNS },
  )
}

test('automatic inversion with band, basins and a table of 1,000 rows', () => {
  const rows = BENCH_CASES.map((benchCase) => {
    const medians = BINS.map((bins) => measure(noisyHistogram(benchCase, bins, SAMPLES)))
    expect(medians.every((time) => Number.isFinite(time))).toBe(true)
    const cells = medians.map((time, place) => {
      const ratio = `×${(time / medians[0]).toFixed(1)} for ×${(BINS[place] / BINS[0]).toFixed(1)}`
      return `${time.toFixed(2)} ms${place === 0 ? '' : ` (${ratio})`}`.padEnd(28)
    })
    return `${benchCase.name.padEnd(24)}${cells.join('')}`
  })
  const head = `${'median after warm-up'.padEnd(24)}${BINS.map((bins) => `${bins} bins`.padEnd(28)).join('')}`
  console.log([`${SAMPLES} samples, ${RUNS} runs`, head, ...rows].join('\n'))
})
