import { performance } from 'node:perf_hooks'
import { expect, test } from 'vitest'
import { correlate, NULL_TABLES } from '@shared/correlation'
import { createJointHistogram } from '@shared/histogram'
import { createRandom } from '@shared/numeric'

const WARM_UPS = 3
const RUNS = 15
const [NX, NY] = [90, 120]

test('correlation of 90 × 120 bins with its null tables', { timeout: 300_000 }, () => {
  for (const samples of [2000, 20_000, 200_000]) {
    const random = createRandom(3)
    const weights = Array.from({ length: NX * NY }, (_, cell) => {
      const [x, y] = [(Math.floor(cell / NY) - 45) / 15, ((cell % NY) - 60) / 20]
      return random.poisson((samples / 1885) * Math.exp(-0.5 * (x * x - x * y + y * y)))
    })
    const joint = createJointHistogram({
      kinds: ['bond', 'angle'],
      xEdges: Array.from({ length: NX + 1 }, (_, edge) => 0.3 + 0.002 * edge),
      yEdges: Array.from({ length: NY + 1 }, (_, edge) => 0.5 + 0.02 * edge),
      weights,
      content: 'count',
    })
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
