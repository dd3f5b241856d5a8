import { describe, expect, it } from 'vitest'
import { DEFAULT_INVERSION_SETTINGS, invert } from '@shared/inversion'
import { makeTable } from '@shared/tables'
import { findAutomatic, runInversion } from '@/workers/inversion-task'
import { angleCounts, TEMPERATURE, withoutSampleSize } from '../components/bench/distributions'

const task = { histogram: angleCounts(), temperature: TEMPERATURE, settings: DEFAULT_INVERSION_SETTINGS }

describe('runInversion', () => {
  it('gives the numbers that the server writes', () => {
    const { answer } = runInversion(task)
    const inversion = invert(task.histogram, TEMPERATURE, task.settings)
    expect(answer?.inversion).toEqual(inversion)
    expect(answer?.table).toEqual(makeTable(inversion.potential, task.settings.table))
  })

  it('hands a refusal on as plain data', () => {
    const outcome = runInversion({ ...task, temperature: -1 })
    expect(outcome.answer).toBeNull()
    expect(outcome.refusal).toMatchObject({ code: 'TEMPERATURE_INVALID', place: { field: 'temperature' } })
    expect(structuredClone(outcome)).toEqual(outcome)
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
