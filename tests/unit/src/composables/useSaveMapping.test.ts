import { flushPromises } from '@vue/test-utils'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { effectScope, shallowRef } from 'vue'
import type { Mapping } from '@shared/contracts/mapping'
import { addBead, changeBead, giveAtoms, type MappingDocument } from '@shared/mapping'
import { ApiError } from '@/api/http'
import * as mappings from '@/api/mappings'
import { useSaveMapping } from '@/composables/useSaveMapping'

const first: MappingDocument = { version: 1, beads: [] }
const mine = addBead(first, 'mine')
const theirs = addBead(first, 'theirs')
const id = '0d5f2b8e-7a51-4f0e-9a39-3f3f6a1b0c11'
const stored = (document: MappingDocument, revision: number): Mapping => ({
  id,
  polymerId: '0d5f2b8e-7a51-4f0e-9a39-3f3f6a1b0c12',
  name: '3-to-1',
  document,
  revision,
  version: 1,
  hasData: false,
  savedAt: '2026-01-02T03:04:05.000Z',
  savedBy: { id, name: 'Bo' },
  counts: { beads: document.beads.length, terms: 0, leftOut: 0, termsWithData: 0, termsUnfit: 0 },
})

const save = vi.spyOn(mappings, 'saveMapping')
const create = vi.spyOn(mappings, 'createMapping')
const onSaved = vi.fn()
let scope = effectScope()
const open = () => {
  const document = shallowRef(first)
  const saving = scope.run(() => useSaveMapping(stored(first, 1), document, onSaved))
  if (saving === undefined) throw new Error('The scope is alive.')
  return { document, saving }
}

beforeEach(() => {
  vi.useFakeTimers()
  scope = effectScope()
  save.mockReset()
  create.mockReset()
  onSaved.mockReset()
  save.mockImplementation((_, change) => Promise.resolve(stored(change.document, change.revision + 1)))
})
afterEach(() => {
  scope.stop()
  vi.useRealTimers()
})

describe('useSaveMapping', () => {
  it('saves once when painting pauses, then with the revision that came back', async () => {
    const { document, saving } = open()
    document.value = mine
    await vi.advanceTimersByTimeAsync(100)
    document.value = addBead(mine, 'more')
    await vi.advanceTimersByTimeAsync(2000)
    expect(save).toHaveBeenCalledTimes(1)
    expect(save.mock.calls[0][1].revision).toBe(1)
    expect(saving.unsaved.value).toBe(false)
    document.value = mine
    expect(await saving.flush()).toBe(true)
    expect(save.mock.calls[1][1].revision).toBe(2)
    expect(onSaved).toHaveBeenCalledTimes(2)
  })

  it('overwrites nothing when someone else saved, and lets a person choose', async () => {
    const { document, saving } = open()
    save.mockRejectedValueOnce(
      new ApiError(409, { code: 'CONFLICT', message: 'Someone saved.', details: stored(theirs, 5) }),
    )
    document.value = mine
    expect(await saving.flush()).toBe(false)
    expect(saving.conflict.value?.revision).toBe(5)
    await saving.flush()
    expect(save).toHaveBeenCalledTimes(1)

    expect(saving.takeTheirs()).toEqual(theirs)
    expect(saving.conflict.value).toBeNull()
    expect(await saving.flush()).toBe(true)
    expect(save.mock.calls[1][1]).toMatchObject({ revision: 5, document: mine })
  })

  it('keeps mine as a new mapping', async () => {
    const { document, saving } = open()
    save.mockRejectedValueOnce(
      new ApiError(409, { code: 'CONFLICT', message: 'Someone saved.', details: stored(theirs, 5) }),
    )
    create.mockResolvedValueOnce(stored(mine, 1))
    document.value = mine
    await saving.flush()
    expect(await saving.keepMine('3-to-1, version 2')).not.toBeNull()
    expect(create.mock.calls[0][1]).toMatchObject({ name: '3-to-1, version 2', document: mine })
    expect(saving.conflict.value).toBeNull()
    expect(saving.unsaved.value).toBe(false)
  })

  it('says since when it could not save, and saves when asked again', async () => {
    const { document, saving } = open()
    save.mockRejectedValueOnce(new ApiError(0, { code: 'NO_CONNECTION', message: 'No answer.' }))
    document.value = mine
    expect(await saving.flush()).toBe(false)
    expect(saving.failedAt.value).toBeInstanceOf(Date)
    expect(saving.unsaved.value).toBe(true)
    expect(await saving.flush()).toBe(true)
    expect(saving.failedAt.value).toBeNull()
    await flushPromises()
  })

  it('keeps what would make a new version from being saved until a person says so', async () => {
    const document = shallowRef(first)
    const measured = { ...stored(first, 1), hasData: true }
    const saving = scope.run(() => useSaveMapping(measured, document, onSaved))
    if (saving === undefined) throw new Error('The scope is alive.')
    document.value = giveAtoms(mine, 'mine', [0])
    await vi.advanceTimersByTimeAsync(5000)
    expect([saving.held.value, await saving.flush()]).toEqual([true, false])
    expect(save).not.toHaveBeenCalled()
    expect(await saving.saveVersion()).toBe(true)
    expect(save).toHaveBeenCalledTimes(1)
    expect(saving.held.value).toBe(false)
  })

  it('saves names and labels of a mapping with data as ever', async () => {
    const painted = giveAtoms(mine, 'mine', [0])
    const document = shallowRef(painted)
    const measured = { ...stored(painted, 1), hasData: true }
    const saving = scope.run(() => useSaveMapping(measured, document, onSaved))
    document.value = changeBead(painted, 'mine', { label: 'backbone', type: 'X' })
    await vi.advanceTimersByTimeAsync(2000)
    expect(saving?.held.value).toBe(false)
    expect(save).toHaveBeenCalledTimes(1)
  })
})
