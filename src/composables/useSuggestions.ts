import { computed, shallowRef, type ComputedRef, type Ref } from 'vue'
import type { RepeatUnit } from '@shared/chemistry'
import { type MappingSuggestion, suggestMappings } from '@shared/mapping'

/** Heavy atoms for each bead that the first suggestion comes nearest to: common practice. */
const USUAL_ATOMS = 4

/** Suggestions for a repeat unit, one at a time on the drawing. */
export interface Suggestions {
  /** Null while nothing is asked; empty when the unit cannot be cut. */
  readonly offered: ComputedRef<readonly MappingSuggestion[] | null>
  readonly shown: ComputedRef<MappingSuggestion | null>
  readonly open: () => void
  readonly show: (beads: number) => void
  /** The one with the next number of beads; after the last the first. */
  readonly next: () => void
  readonly leave: () => void
}

/** Suggestions are computed when asked for. The first one shown has about four heavy atoms in each bead. */
export function useSuggestions(unit: Ref<RepeatUnit>): Suggestions {
  const offered = shallowRef<readonly MappingSuggestion[] | null>(null)
  const beads = shallowRef<number | null>(null)
  const shown = computed(() => offered.value?.find((each) => each.beads === beads.value) ?? null)

  const open = (): void => {
    const found = suggestMappings(unit.value)
    const usual = unit.value.atoms.length / USUAL_ATOMS
    const nearest = found.toSorted((a, b) => Math.abs(a.beads - usual) - Math.abs(b.beads - usual))
    offered.value = found
    beads.value = nearest[0]?.beads ?? null
  }
  const show = (count: number): void => {
    beads.value = count
  }
  const next = (): void => {
    const all = offered.value ?? []
    const place = all.findIndex((each) => each.beads === beads.value)
    beads.value = all[(place + 1) % all.length]?.beads ?? null
  }
  const leave = (): void => {
    offered.value = null
    beads.value = null
  }
  return { offered: computed(() => offered.value), shown, open, show, next, leave }
}
