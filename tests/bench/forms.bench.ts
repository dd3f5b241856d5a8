import { expect, test } from 'vitest'
import { formPotential, formsOfKind, fitForm, rankForms } from '@shared/forms'
import { BENCH_CASES, medianTime, noisyHistogram } from '../support/bench-cases'

const BINS = 360
const SAMPLES = [2000, 100_000]
const TEMPERATURE = 400
const LIMITS = { warmUps: 15, runs: 21 }

test('all forms of a kind, ranked, on 360 bins', () => {
  const lines = SAMPLES.flatMap((samples) =>
    BENCH_CASES.map((benchCase) => {
      const histogram = noisyHistogram(benchCase, BINS, samples)
      const all = medianTime(() => rankForms(histogram, TEMPERATURE), LIMITS)
      const [best] = rankForms(histogram, TEMPERATURE).candidates
      if (best.outcome === 'refused') throw new Error('No form fits.')
      const potential = medianTime(() => formPotential(best), LIMITS)
      const single = formsOfKind(benchCase.kind).map((form) => {
        const time = medianTime(() => fitForm(histogram, TEMPERATURE, form), { warmUps: 3, runs: 9 })
        return `${form} ${time.toFixed(1)}`
      })
      expect(Number.isFinite(all + potential)).toBe(true)
      const head = `${String(samples).padEnd(8)}${benchCase.name.padEnd(24)}`
      return `${head}ranking ${all.toFixed(1)} ms; ${single.join(', ')}; potential of the best ${potential.toFixed(1)} ms`
    }),
  )
  console.log([`medians of ${LIMITS.runs} runs`, ...lines].join('\n'))
})
