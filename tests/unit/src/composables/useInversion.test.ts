import { flushPromises } from '@vue/test-utils'
import { effectScope, shallowRef } from 'vue'
import { describe, expect, it, vi } from 'vitest'
import { InvalidInputError } from '@shared/errors'
import { DEFAULT_INVERSION_SETTINGS, type InversionSettings } from '@shared/inversion'
import { useInversion } from '@/composables/useInversion'
import type { InversionTask, InversionWorker } from '@/workers'
import { findAutomatic, runInversion, type Outcome } from '@/workers/inversion-task'
import { angleCounts, bondCounts, TEMPERATURE } from '../components/bench/distributions'

const unwrap = <Answer>(outcome: Outcome<Answer>): Answer => {
  if (outcome.refusal === null) return outcome.answer
  throw new InvalidInputError(outcome.refusal.code, outcome.refusal.message, outcome.refusal.place)
}

const set = (settings: Partial<InversionSettings> = {}) => {
  const worker = {
    runRanking: vi.fn<InversionWorker['runRanking']>(),
    runInversion: vi.fn<InversionWorker['runInversion']>(async (task) => {
      await Promise.resolve()
      return unwrap(runInversion(task))
    }),
    findAutomatic: vi.fn<InversionWorker['findAutomatic']>(async (task) => {
      await Promise.resolve()
      return unwrap(findAutomatic(task))
    }),
    stop: vi.fn(),
  }
  const task = shallowRef<InversionTask | null>({
    histogram: angleCounts(),
    temperature: TEMPERATURE,
    basinDepth: 0.5,
    flatBelow: 0.5,
    settings: { ...DEFAULT_INVERSION_SETTINGS, ...settings },
  })
  const scope = effectScope()
  const state = scope.run(() =>
    useInversion(
      () => task.value,
      () => worker,
    ),
  )!
  return { state, task, worker, scope }
}

describe('useInversion', () => {
  it('inverts, and knows where automatic smoothing sits without asking again', async () => {
    const { state, worker } = set()
    await flushPromises()
    expect(state.answer.value?.table.coordinates).toHaveLength(1000)
    expect(state.automatic.value).toBe(state.answer.value?.inversion.smoothing.log10Lambda)
    expect(worker.findAutomatic).not.toHaveBeenCalled()
  })

  it('asks once where automatic smoothing sits while the slider moves by hand', async () => {
    const { state, task, worker } = set({ smoothing: { mode: 'manual', log10Lambda: 6 } })
    await flushPromises()
    const automatic = state.automatic.value
    expect(automatic).not.toBeNull()
    expect(state.answer.value?.inversion.smoothing.log10Lambda).toBe(6)
    for (const log10Lambda of [6.1, 6.2]) {
      const settings = { ...task.value!.settings, smoothing: { mode: 'manual', log10Lambda } as const }
      task.value = { ...task.value!, settings }
      await flushPromises()
    }
    expect(worker.findAutomatic).toHaveBeenCalledTimes(1)
    expect(state.automatic.value).toBe(automatic)
  })

  it('shows nothing of one histogram while the next is inverted', async () => {
    const { state, task } = set()
    await flushPromises()
    task.value = { ...task.value!, histogram: bondCounts() }
    expect(state.answer.value).toBeNull()
    await flushPromises()
    expect(state.answer.value?.inversion.kind).toBe('bond')
  })

  it('keeps the figure and says why settings are refused', async () => {
    const { state, task } = set()
    await flushPromises()
    const table = { ...task.value!.settings.table, low: 2, high: 1 }
    task.value = { ...task.value!, settings: { ...task.value!.settings, table } }
    await flushPromises()
    expect(state.error.value).toBeInstanceOf(InvalidInputError)
    expect((state.error.value as InvalidInputError).place.field).toBe('high')
    expect(state.answer.value).not.toBeNull()
  })

  it('stops its worker with its scope', () => {
    const { scope, worker } = set()
    scope.stop()
    expect(worker.stop).toHaveBeenCalledOnce()
  })
})
