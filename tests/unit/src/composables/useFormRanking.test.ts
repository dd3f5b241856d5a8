import { flushPromises } from '@vue/test-utils'
import { effectScope, nextTick, shallowRef } from 'vue'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { DEFAULT_INVERSION_SETTINGS, type InversionSettings } from '@shared/inversion'
import { useFormRanking } from '@/composables/useFormRanking'
import type { InversionTask, InversionWorker } from '@/workers'
import { runRanking } from '@/workers/inversion-task'
import { angleCounts, bondCounts, TEMPERATURE } from '../components/bench/distributions'

beforeEach(() => vi.useFakeTimers())
afterEach(() => vi.useRealTimers())

const set = () => {
  const worker = {
    // Only what can be cloned crosses to a worker.
    runRanking: vi.fn<InversionWorker['runRanking']>((task) =>
      Promise.resolve(runRanking(structuredClone(task)).answer!),
    ),
    stop: vi.fn(),
  }
  const task = shallowRef<InversionTask | null>({
    histogram: angleCounts(),
    temperature: TEMPERATURE,
    settings: DEFAULT_INVERSION_SETTINGS,
    basinDepth: 0.5,
    flatBelow: 0.5,
  })
  const scope = effectScope()
  const state = scope.run(() =>
    useFormRanking(
      () => task.value,
      () => worker,
    ),
  )!
  const change = async (settings: Partial<InversionSettings>): Promise<void> => {
    task.value = { ...task.value!, settings: { ...task.value!.settings, ...settings } }
    await nextTick()
  }
  const rest = async (): Promise<void> => {
    vi.advanceTimersByTime(1000)
    await flushPromises()
  }
  return { state, task, worker, scope, change, rest }
}

describe('useFormRanking', () => {
  it('waits until a slider rests, and asks once for where it stands', async () => {
    const { state, worker, change, rest } = set()
    await rest()
    expect(state.ranking.value?.ranking.candidates.length).toBeGreaterThan(2)
    for (const log10Lambda of [1, 2, 3]) await change({ smoothing: { mode: 'manual', log10Lambda } })
    expect(worker.runRanking).toHaveBeenCalledTimes(1)
    await rest()
    expect(worker.runRanking).toHaveBeenCalledTimes(2)
    expect(worker.runRanking.mock.lastCall?.[0].settings.smoothing).toEqual({
      mode: 'manual',
      log10Lambda: 3,
    })
  })

  it('does not ask again for the form that was chosen, nor for the table', async () => {
    const { worker, change, rest } = set()
    await rest()
    await change({ form: 'harmonic' })
    await change({ table: { ...DEFAULT_INVERSION_SETTINGS.table, rows: 500 } })
    await rest()
    expect(worker.runRanking).toHaveBeenCalledTimes(1)
  })

  it('never shows the ranking of another histogram', async () => {
    const { state, task, rest } = set()
    await rest()
    task.value = { ...task.value!, histogram: bondCounts() }
    await nextTick()
    expect(state.ranking.value).toBeNull()
    await rest()
    expect(state.ranking.value?.ranking.kind).toBe('bond')
  })

  it('stops its worker with its scope', () => {
    const { worker, scope } = set()
    scope.stop()
    expect(worker.stop).toHaveBeenCalledTimes(1)
  })
})
