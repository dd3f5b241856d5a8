import { performance } from 'node:perf_hooks'
import { expect, test } from 'vitest'
import { parseRepeatUnit } from '@shared/chemistry'
import { MOST_SUGGESTED_BEADS, suggestMappings } from '@shared/mapping'

const WARM_UPS = 3
const RUNS = 15
const UNITS = {
  'a straight chain of 60': `*${'C'.repeat(60)}*`,
  'a polyamide whose border is the amide': `*C(=O)${'C'.repeat(57)}N*`,
  'a branched acrylate': `*CC(*)C(=O)OCC(${'C'.repeat(18)})(${'C'.repeat(17)})${'C'.repeat(18)}`,
  'twenty side groups': `*${'C(CC)'.repeat(20)}*`,
}

test('suggestions for units of 60 heavy atoms', { timeout: 60_000 }, async () => {
  for (const [name, smiles] of Object.entries(UNITS)) {
    const unit = await parseRepeatUnit(smiles)
    expect(unit.atoms).toHaveLength(60)
    const times: number[] = []
    for (let run = 0; run < WARM_UPS + RUNS; run++) {
      const start = performance.now()
      const suggestions = suggestMappings(unit)
      if (run >= WARM_UPS) times.push(performance.now() - start)
      expect(suggestions).toHaveLength(MOST_SUGGESTED_BEADS)
    }
    times.sort((one, other) => one - other)
    console.log(
      `${name}: median ${times[RUNS >> 1].toFixed(1)} ms of ${RUNS} runs, worst ${times[RUNS - 1].toFixed(1)} ms`,
    )
  }
})
