import { flushPromises } from '@vue/test-utils'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { effectScope, nextTick, ref } from 'vue'
import type { JointDistribution, Pair } from '@shared/contracts/distribution'
import { DEFAULT_THRESHOLDS, type Correlation } from '@shared/correlation'
import * as api from '@/api/joint-distributions'
import { useCorrelation } from '@/composables/useCorrelation'
import { pairKey, useCorrelationPairs } from '@/composables/useCorrelationPairs'
import { useCorrelationReading } from '@/composables/useCorrelationReading'
import type { CorrelationWorker } from '@/workers/correlation'

const stored = (id: string): JointDistribution =>
  ({ id, kinds: ['bond', 'angle'], xEdges: [0, 1], yEdges: [0, 1], weights: [1], content: 'count' }) as never

const pair = (first: string, second: string, jointDistributionId: string | null = null): Pair => ({
  firstTermId: first,
  secondTermId: second,
  name: `${first} · ${second}`,
  jointDistributionId,
  numbers: null,
  decision: null,
})

/** A worker whose answers are given by hand, in any order. */
function heldWorker() {
  const waiting: ((correlation: Correlation) => void)[] = []
  const worker: CorrelationWorker = {
    runCorrelation: () => new Promise((resolve) => waiting.push(resolve)),
    stop: vi.fn(),
  }
  return { worker, waiting }
}

afterEach(() => vi.restoreAllMocks())

describe('useCorrelation', () => {
  it('shows a distribution and what it says together, never one of another', async () => {
    vi.spyOn(api, 'getJointDistribution').mockImplementation((id) => Promise.resolve(stored(id)))
    const { worker, waiting } = heldWorker()
    const id = ref('first')
    const scope = effectScope()
    const state = scope.run(() =>
      useCorrelation(
        () => id.value,
        () => DEFAULT_THRESHOLDS,
        () => worker,
      ),
    )!
    await flushPromises()
    expect(state.joint.value).toBeNull()
    id.value = 'second'
    await flushPromises()
    waiting[1]({ verdict: 'joint' } as Correlation)
    await flushPromises()
    waiting[0]({ verdict: 'separable' } as Correlation)
    await flushPromises()
    expect([state.joint.value?.id, state.correlation.value?.verdict]).toEqual(['second', 'joint'])
    scope.stop()
    expect(worker.stop).toHaveBeenCalledOnce()
  })

  it('keeps the reason of a failure and tries again when asked', async () => {
    const get = vi.spyOn(api, 'getJointDistribution').mockRejectedValueOnce(new Error('no answer'))
    const { worker, waiting } = heldWorker()
    const scope = effectScope()
    const state = scope.run(() =>
      useCorrelation(
        () => 'only',
        () => DEFAULT_THRESHOLDS,
        () => worker,
      ),
    )!
    await flushPromises()
    expect(state.error.value?.message).toBe('no answer')
    get.mockResolvedValueOnce(stored('only'))
    void state.retry()
    await flushPromises()
    waiting[0]({ verdict: 'borderline' } as Correlation)
    await flushPromises()
    expect(state.error.value).toBeNull()
    expect(state.correlation.value?.verdict).toBe('borderline')
    scope.stop()
  })

  it('takes over a recorded decision only for the distribution on screen', async () => {
    vi.spyOn(api, 'getJointDistribution').mockResolvedValue(stored('only'))
    const { worker, waiting } = heldWorker()
    const scope = effectScope()
    const state = scope.run(() =>
      useCorrelation(
        () => 'only',
        () => DEFAULT_THRESHOLDS,
        () => worker,
      ),
    )!
    await flushPromises()
    waiting[0]({} as Correlation)
    await flushPromises()
    state.replace({ ...stored('other'), demo: true })
    expect(state.joint.value?.demo).toBeUndefined()
    state.replace({ ...stored('only'), demo: true })
    expect(state.joint.value?.demo).toBe(true)
    scope.stop()
  })
})

describe('useCorrelationPairs', () => {
  it('chooses the pair named, else the first with data, else the first', async () => {
    const all = [pair('a', 'b'), pair('c', 'd', 'joint'), pair('e', 'f')]
    vi.spyOn(api, 'listPairs').mockResolvedValue(all)
    const named = ref<string | null>(pairKey(all[2]))
    const scope = effectScope()
    const state = scope.run(() =>
      useCorrelationPairs(
        () => ({ mappingId: 'm', statePointId: 's' }),
        () => named.value,
      ),
    )!
    await flushPromises()
    expect(state.chosen.value).toBe(all[2])
    named.value = 'gone~gone'
    expect(state.chosen.value).toBe(all[1])
    scope.stop()
  })

  it('forgets the pairs of one state point while those of another are on their way', async () => {
    const list = vi.spyOn(api, 'listPairs').mockResolvedValueOnce([pair('a', 'b')])
    const statePointId = ref('s1')
    const scope = effectScope()
    const state = scope.run(() =>
      useCorrelationPairs(
        () => ({ mappingId: 'm', statePointId: statePointId.value }),
        () => null,
      ),
    )!
    await flushPromises()
    expect(state.pairs.value).toHaveLength(1)
    list.mockRejectedValueOnce(new Error('away'))
    statePointId.value = 's2'
    await nextTick()
    expect(state.chosen.value).toBeNull()
    await flushPromises()
    expect(state.error.value?.message).toBe('away')
    scope.stop()
  })
})

describe('useCorrelationReading', () => {
  const bounds = { x: [2, 6], y: [0, 9], start: { ix: 4, iy: 5 } } as const

  it('starts at the densest cell, moves by cells and stops at the border', () => {
    const scope = effectScope()
    const { place, move } = scope.run(() => useCorrelationReading(() => bounds))!
    move(1, 0)
    expect(place.value).toEqual({ ix: 4, iy: 5 })
    move(1, 0)
    expect(place.value).toEqual({ ix: 5, iy: 5 })
    move(5, -9)
    expect(place.value).toEqual({ ix: 6, iy: 0 })
    scope.stop()
  })

  it('is gone when the map changes', async () => {
    const shown = ref<{ x: [number, number]; y: [number, number]; start: { ix: number; iy: number } }>({
      x: [0, 3],
      y: [0, 3],
      start: { ix: 1, iy: 1 },
    })
    const scope = effectScope()
    const { place, read } = scope.run(() => useCorrelationReading(() => shown.value))!
    read({ ix: 2, iy: 2 })
    shown.value = { ...shown.value }
    await nextTick()
    expect(place.value).toBeNull()
    scope.stop()
  })
})
