import { shallowRef, watch, type Ref, type ShallowRef } from 'vue'
import { useDebounceFn } from '@vueuse/core'
import type { RepeatUnit } from '@shared/chemistry'
import { InvalidInputError } from '@shared/errors'

/** Where a SMILES stands: being read, a repeat unit, or refused with a sentence and perhaps a place. */
export type RepeatUnitCheck =
  | { readonly state: 'empty' }
  | { readonly state: 'reading' }
  | { readonly state: 'good'; readonly unit: RepeatUnit }
  | { readonly state: 'refused'; readonly message: string; readonly position: number | null }

const PAUSE = 250

/** Reads a repeat unit while its SMILES is typed, a moment after the last key. The chemistry loads with the first reading. */
export function useRepeatUnitCheck(smiles: Ref<string>): {
  check: ShallowRef<RepeatUnitCheck>
  read: () => Promise<void>
} {
  const check = shallowRef<RepeatUnitCheck>({ state: 'empty' })
  let asked = 0

  /** Reads what stands there now. */
  const read = async (): Promise<void> => {
    const question = ++asked
    const text = smiles.value
    if (text.trim() === '') {
      check.value = { state: 'empty' }
      return
    }
    const { parseRepeatUnit } = await import('@shared/chemistry')
    const result = await parseRepeatUnit(text).then(
      (unit): RepeatUnitCheck => ({ state: 'good', unit }),
      (error: unknown): RepeatUnitCheck => {
        if (!(error instanceof InvalidInputError)) throw error
        return { state: 'refused', message: error.message, position: error.place.position ?? null }
      },
    )
    if (question === asked) check.value = result
  }

  const readSoon = useDebounceFn(read, PAUSE)
  watch(
    smiles,
    () => {
      asked += 1
      check.value = { state: smiles.value.trim() === '' ? 'empty' : 'reading' }
      void readSoon()
    },
    { immediate: smiles.value !== '' },
  )

  return { check, read }
}
