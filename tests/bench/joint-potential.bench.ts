import { performance } from 'node:perf_hooks'
import { expect, test } from 'vitest'
import {
  DEFAULT_JOINT_SETTINGS,
  DEFAULT_JOINT_TABLE,
  jointPotential,
  jointTable,
} from '@shared/joint-potential'
import { noisyJointHistogram } from '../support/bench-cases'

const WARM_UPS = 2
const RUNS = 9

test('joint potential of 90 × 120 bins', { timeout: 300_000 }, () => {
  for (const samples of [2000, 20_000, 200_000]) {
    const joint = noisyJointHistogram(samples)
    const [fits, tables, processor]: number[][] = [[], [], []]
    for (let run = 0; run < WARM_UPS + RUNS; run++) {
      const before = process.cpuUsage()
      const start = performance.now()
      const { surface } = jointPotential(joint, 400, DEFAULT_JOINT_SETTINGS)
      const middle = performance.now()
      const { energies } = jointTable(surface, DEFAULT_JOINT_TABLE)
      expect(Math.min(...energies)).toBeGreaterThan(-1e-9)
      if (run < WARM_UPS) continue
      fits.push(middle - start)
      tables.push(performance.now() - middle)
      processor.push(process.cpuUsage(before).user / 1000)
    }
    const [fit, table, busy] = [fits, tables, processor].map((times) => {
      times.sort((one, other) => one - other)
      return times[RUNS >> 1].toFixed(0)
    })
    console.log(
      `${samples} samples: median ${fit} ms for the fit and ${table} ms for a table of 101 × 181 rows, ${busy} ms of processor time together, of ${RUNS} runs`,
    )
  }
})
