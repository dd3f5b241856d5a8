import { performance } from 'node:perf_hooks'
import { expect, test } from 'vitest'
import { correlate, NULL_TABLES } from '@shared/correlation'
import { noisyJointHistogram } from '../support/bench-cases'

const WARM_UPS = 3
const RUNS = 15

test('correlation of 90 × 120 bins with its null tables', { timeout: 300_000 }, () => {
  for (const samples of [2000, 20_000, 200_000]) {
    const joint = noisyJointHistogram(samples)
    const times: number[] = []
    for (let run = 0; run < WARM_UPS + RUNS; run++) {
      const start = performance.now()
      const { mutualInformationCorrected } = correlate(joint)
      if (run >= WARM_UPS) times.push(performance.now() - start)
      expect(Number.isFinite(mutualInformationCorrected)).toBe(true)
    }
    times.sort((one, other) => one - other)
    console.log(
      `${samples} samples, ${NULL_TABLES} null tables: median ${times[RUNS >> 1].toFixed(1)} ms of ${RUNS} runs`,
    )
  }
})
