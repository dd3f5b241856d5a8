import { beforeEach, describe, expect, it } from 'vitest'
import { nextTick, shallowRef } from 'vue'
import { DEFAULT_INVERSION_SETTINGS, type InversionSettings } from '@shared/inversion'
import type { BenchPlace } from '@/composables/useBenchTerm'
import { sameSettings, useInversionDrafts } from '@/composables/useInversionDrafts'

const one: BenchPlace = { termId: 'one', statePointId: 'hot' }
const other: BenchPlace = { termId: 'other', statePointId: 'hot' }
const byHand: InversionSettings = {
  ...DEFAULT_INVERSION_SETTINGS,
  smoothing: { mode: 'manual', log10Lambda: 3 },
}

const set = () => {
  const place = shallowRef<BenchPlace | null>(one)
  const saved = shallowRef<InversionSettings | null>(null)
  return {
    place,
    saved,
    draft: useInversionDrafts(
      () => place.value,
      () => saved.value,
    ),
  }
}

beforeEach(() => sessionStorage.clear())

describe('useInversionDrafts', () => {
  it('starts from the defaults, or from what is saved', () => {
    const { draft, saved } = set()
    expect(draft.settings.value).toEqual(DEFAULT_INVERSION_SETTINGS)
    saved.value = byHand
    expect(draft.settings.value).toEqual(byHand)
    expect(draft.changed.value).toBe(false)
  })

  it('keeps the changes of one term while another is looked at', () => {
    const { draft, place } = set()
    draft.change(byHand)
    place.value = other
    expect(draft.settings.value).toEqual(DEFAULT_INVERSION_SETTINGS)
    place.value = one
    expect(draft.settings.value).toEqual(byHand)
    expect(draft.changed.value).toBe(true)
  })

  it('keeps the changes when the room is entered again', async () => {
    set().draft.change(byHand)
    await nextTick()
    expect(set().draft.settings.value).toEqual(byHand)
  })

  it('is unchanged again once the old settings are put back, and after undo', () => {
    const { draft } = set()
    draft.change(byHand)
    draft.change({ ...DEFAULT_INVERSION_SETTINGS })
    expect(draft.changed.value).toBe(false)
    draft.change(byHand)
    draft.undo()
    expect(draft.settings.value).toEqual(DEFAULT_INVERSION_SETTINGS)
  })

  it('takes no draft it cannot read', () => {
    sessionStorage.setItem(
      'beadwright.bench-drafts',
      JSON.stringify({ 'one hot': { version: 1, jacobian: 'yes' } }),
    )
    expect(set().draft.settings.value).toEqual(DEFAULT_INVERSION_SETTINGS)
  })
})

describe('sameSettings', () => {
  it('tells apart what would give another curve or table', () => {
    const { table } = DEFAULT_INVERSION_SETTINGS
    expect(sameSettings(byHand, { ...byHand })).toBe(true)
    expect(sameSettings(byHand, { ...byHand, jacobian: false })).toBe(false)
    expect(sameSettings(byHand, { ...byHand, table: { ...table, cap: 200 } })).toBe(false)
    expect(sameSettings(byHand, { ...byHand, smoothing: { mode: 'manual', log10Lambda: 3.01 } })).toBe(false)
  })
})
