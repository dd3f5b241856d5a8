import { describe, expect, it } from 'vitest'
import { curveBasins } from '@shared/basins'
import { derivePotential, rankForms } from '@shared/forms'
import { DEFAULT_INVERSION_SETTINGS, invert } from '@shared/inversion'
import { makeTable } from '@shared/tables'
import { findAutomatic, runInversion, runRanking } from '@/workers/inversion-task'
import {
  angleCounts,
  dihedralCounts,
  TEMPERATURE,
  withoutSampleSize,
} from '../components/bench/distributions'

const task = {
  histogram: angleCounts(),
  temperature: TEMPERATURE,
  settings: DEFAULT_INVERSION_SETTINGS,
  basinDepth: 0.5,
  flatBelow: 0.5,
}

describe('runInversion', () => {
  it('gives the numbers that the server writes', () => {
    const { answer } = runInversion(task)
    const inversion = invert(task.histogram, TEMPERATURE, task.settings)
    expect(answer?.inversion).toEqual(inversion)
    expect(answer?.table).toEqual(makeTable(inversion.potential, task.settings.table))
  })

  it('makes the table of the chosen form as the server does, whatever was asked before', () => {
    const harmonic = { ...task.settings, form: 'harmonic' }
    const asked = [harmonic, { ...harmonic, form: 'quartic' }, harmonic, { ...harmonic, jacobian: false }]
    for (const settings of asked) {
      const { answer } = runInversion({ ...task, settings })
      const derived = derivePotential(task.histogram, TEMPERATURE, settings)
      expect(answer?.form).toEqual(derived.form)
      expect(answer?.table).toEqual(makeTable(derived.inversion.potential, settings.table))
    }
  })

  it('counts basins of the smooth curve at the depth asked for, and judges only a dihedral', () => {
    const histogram = dihedralCounts()
    const { answer } = runInversion({ ...task, histogram, basinDepth: 1 })
    expect(answer?.basins).toEqual(curveBasins(answer!.smooth.potential, { depth: 1, deviations: 2 }))
    // 3 (1 + cos 3φ) kJ/mol: three wells, 6 kJ/mol deep.
    expect(answer?.basins.basins).toHaveLength(3)
    expect(answer?.flatness?.verdict).toBe('keep')
    expect(runInversion(task).answer?.flatness).toBeNull()
  })

  it('hands a refusal on as plain data', () => {
    const outcome = runInversion({ ...task, temperature: -1 })
    expect(outcome.answer).toBeNull()
    expect(outcome.refusal).toMatchObject({ code: 'TEMPERATURE_INVALID', place: { field: 'temperature' } })
    expect(structuredClone(outcome)).toEqual(outcome)
  })
})

describe('runRanking', () => {
  it('ranks as the core does, and compares again with each smooth curve', () => {
    const deviations = [2, 9].map((log10Lambda) => {
      const settings = { ...task.settings, smoothing: { mode: 'manual', log10Lambda } as const }
      const { ranking } = runRanking({ ...task, settings }).answer!
      const reference = invert(task.histogram, TEMPERATURE, settings).potential
      expect(ranking).toEqual(rankForms(task.histogram, TEMPERATURE, { reference }))
      return ranking.candidates.map((each) =>
        each.outcome === 'fitted' ? each.largestDeviation?.value : null,
      )
    })
    expect(deviations[0]).not.toEqual(deviations[1])
  })

  it('puts the smooth curve on the scale of the forms: what a parameter costs is 2', () => {
    // Data from a harmonic angle: the stiff limit of the curve is the harmonic form, with the same likelihood and cost.
    const settings = { ...task.settings, smoothing: { mode: 'manual', log10Lambda: 14 } as const }
    const { ranking, curveAic } = runRanking({ ...task, settings }).answer!
    const harmonic = ranking.candidates.find(({ form }) => form === 'harmonic')
    expect(harmonic?.outcome === 'fitted' && Math.abs(harmonic.aic! - curveAic!)).toBeLessThan(0.5)
  })

  it('has no AIC without a sample size', () => {
    const { curveAic, ranking } = runRanking({
      ...task,
      histogram: withoutSampleSize(task.histogram),
    }).answer!
    expect(curveAic).toBeNull()
    expect(ranking.candidates.every((each) => each.outcome === 'refused' || each.aic === null)).toBe(true)
  })
})

describe('findAutomatic', () => {
  it('finds the same place whatever smoothing is in force', () => {
    const automatic = runInversion(task).answer?.inversion.smoothing.log10Lambda
    const settings = { ...task.settings, smoothing: { mode: 'off' } as const }
    expect(findAutomatic({ ...task, settings }).answer).toBe(automatic)
  })

  it('is null where nothing can be chosen', () => {
    expect(findAutomatic({ ...task, histogram: withoutSampleSize(task.histogram) }).answer).toBeNull()
  })
})
