import { shallowRef, toValue, watchEffect, type MaybeRefOrGetter, type ShallowRef } from 'vue'
import { layoutRepeatUnit, parseRepeatUnit, type RepeatUnit, type RepeatUnitLayout } from '@shared/chemistry'

/** A repeat unit with its drawing. */
export interface DrawnRepeatUnit {
  readonly unit: RepeatUnit
  readonly layout: RepeatUnitLayout
}

/** Reads and lays out a SMILES that the server has accepted; the two chemistry libraries load here. Null until then. */
export function useRepeatUnit(smiles: MaybeRefOrGetter<string>): ShallowRef<DrawnRepeatUnit | null> {
  const drawn = shallowRef<DrawnRepeatUnit | null>(null)
  const load = async (text: string, isCurrent: () => boolean): Promise<void> => {
    const [unit, layout] = await Promise.all([parseRepeatUnit(text), layoutRepeatUnit(text)])
    if (isCurrent()) drawn.value = { unit, layout }
  }
  watchEffect((onCleanup) => {
    let current = true
    onCleanup(() => (current = false))
    void load(toValue(smiles), () => current)
  })
  return drawn
}
