import { afterEach, describe, expect, it, vi } from 'vitest'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { ApiError } from '@/api/http'
import * as potentials from '@/api/potentials'
import { useSavePotential } from '@/composables/useSavePotential'
import { storedPotential } from '../components/bench/stored-records'

const place = { termId: 'term', statePointId: 'hot' }
const set = () => {
  const onSaved = vi.fn()
  const put = vi.spyOn(potentials, 'savePotential')
  return { saving: useSavePotential(onSaved), onSaved, put }
}

afterEach(() => vi.restoreAllMocks())

describe('useSavePotential', () => {
  it('sends the settings with the revision they rest on, and is silent when saved', async () => {
    const { saving, onSaved, put } = set()
    put.mockResolvedValue(storedPotential({ revision: 4 }))
    expect(await saving.save(place, DEFAULT_INVERSION_SETTINGS, 3)).toBe(true)
    expect(put).toHaveBeenCalledWith('term', {
      statePointId: 'hot',
      revision: 3,
      settings: DEFAULT_INVERSION_SETTINGS,
    })
    expect(onSaved).toHaveBeenCalledWith(expect.objectContaining({ revision: 4 }))
    expect(saving.error.value).toBeNull()
  })

  it('puts what someone else saved before a person, and overwrites nothing', async () => {
    const { saving, onSaved, put } = set()
    const theirs = storedPotential({ revision: 5 })
    put.mockRejectedValue(new ApiError(409, { code: 'CONFLICT', message: 'Changed.', details: theirs }))
    expect(await saving.save(place, DEFAULT_INVERSION_SETTINGS, 3)).toBe(false)
    expect(saving.conflict.value).toEqual(theirs)
    expect(onSaved).not.toHaveBeenCalled()
    saving.forget()
    expect(saving.conflict.value).toBeNull()
  })

  it('remembers since when nothing could be saved', async () => {
    const { saving, put } = set()
    put.mockRejectedValue(new ApiError(503, { code: 'UNAVAILABLE', message: 'Not now.' }))
    await saving.save(place, DEFAULT_INVERSION_SETTINGS, 3)
    const since = saving.failedAt.value
    expect(since).toBeInstanceOf(Date)
    await saving.save(place, DEFAULT_INVERSION_SETTINGS, 3)
    expect(saving.failedAt.value).toBe(since)
    put.mockResolvedValue(storedPotential())
    await saving.save(place, DEFAULT_INVERSION_SETTINGS, 3)
    expect(saving.failedAt.value).toBeNull()
  })

  it('is no longer saving after a failure that is not the server’s', async () => {
    const { saving, put } = set()
    put.mockRejectedValue(new TypeError('broken'))
    await expect(saving.save(place, DEFAULT_INVERSION_SETTINGS, 3)).rejects.toThrow('broken')
    expect(saving.saving.value).toBe(false)
  })
})
