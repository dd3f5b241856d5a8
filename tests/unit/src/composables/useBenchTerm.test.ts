import { flushPromises } from '@vue/test-utils'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { effectScope, shallowRef } from 'vue'
import type { Distribution } from '@shared/contracts/distribution'
import * as distributions from '@/api/distributions'
import { ApiError } from '@/api/http'
import * as potentials from '@/api/potentials'
import { useBenchTerm, type BenchPlace } from '@/composables/useBenchTerm'
import { angleCounts } from '../components/bench/distributions'
import { storedDistribution, storedPotential } from '../components/bench/stored-records'

const one: BenchPlace = { termId: 'one', statePointId: 'hot' }
const stored = storedDistribution(angleCounts())

const set = () => {
  const place = shallowRef<BenchPlace | null>(one)
  const term = effectScope().run(() => useBenchTerm(() => place.value))!
  return { place, term }
}

afterEach(() => vi.restoreAllMocks())

describe('useBenchTerm', () => {
  it('loads distribution and potential together', async () => {
    vi.spyOn(distributions, 'findDistribution').mockResolvedValue(stored)
    vi.spyOn(potentials, 'findPotential').mockResolvedValue(storedPotential())
    const { term } = set()
    expect(term.loaded.value).toBeNull()
    await flushPromises()
    expect(term.distribution.value).toBe(stored)
    expect(term.potential.value?.revision).toBe(3)
    expect(term.loaded.value).toEqual(one)
  })

  it('shows nothing of a term left meanwhile, however late its answer', async () => {
    const late = new Map<string, (found: Distribution | null) => void>()
    vi.spyOn(potentials, 'findPotential').mockResolvedValue(null)
    vi.spyOn(distributions, 'findDistribution').mockImplementation(
      (termId) => new Promise((resolve) => late.set(termId, resolve)),
    )
    const { place, term } = set()
    place.value = { termId: 'other', statePointId: 'hot' }
    await flushPromises()
    late.get('other')!(null)
    await flushPromises()
    late.get('one')!(stored)
    await flushPromises()
    expect(term.distribution.value).toBeNull()
    expect(term.loaded.value?.termId).toBe('other')
  })

  it('says that loading failed, and loads again on request', async () => {
    vi.spyOn(potentials, 'findPotential').mockResolvedValue(null)
    const find = vi.spyOn(distributions, 'findDistribution')
    find.mockRejectedValueOnce(new ApiError(503, { code: 'UNAVAILABLE', message: 'Not now.' }))
    const { term } = set()
    await flushPromises()
    expect(term.error.value?.message).toBe('Not now.')
    find.mockResolvedValueOnce(stored)
    await term.reload()
    expect(term.error.value).toBeNull()
    expect(term.distribution.value).toBe(stored)
  })

  it('states the sample size of the distribution on screen', async () => {
    vi.spyOn(potentials, 'findPotential').mockResolvedValue(null)
    vi.spyOn(distributions, 'findDistribution').mockResolvedValue(stored)
    const update = vi
      .spyOn(distributions, 'updateDistribution')
      .mockResolvedValue({ ...stored, independentSamples: 500 })
    const { term } = set()
    await flushPromises()
    await term.stateSamples(500)
    expect(update).toHaveBeenCalledWith(stored.id, { independentSamples: 500 })
    expect(term.distribution.value?.independentSamples).toBe(500)
  })
})
