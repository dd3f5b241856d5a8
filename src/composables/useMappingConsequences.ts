import { computed, type ComputedRef, type Ref, type ShallowRef } from 'vue'
import type { RepeatUnit } from '@shared/chemistry'
import {
  checkMapping,
  type DerivedTerm,
  deriveTerms,
  hasTooManyPlaces,
  type MappingDocument,
  type MappingProblem,
  placeFlags,
  type PlaceFlag,
} from '@shared/mapping'
import { useFollowing } from './useFollowing'

/** A mapping with the terms that follow from it. */
export interface MappingTerms {
  readonly document: MappingDocument
  /** None while there are too many to list: a problem says so. */
  readonly terms: readonly DerivedTerm[]
}

/** What follows from a mapping; during a stroke each part lags some frames behind it. */
export interface MappingConsequences {
  /** As the bead table shows it. */
  readonly beads: ShallowRef<MappingDocument>
  readonly problems: ComputedRef<readonly MappingProblem[]>
  readonly terms: ComputedRef<MappingTerms>
  /** Sequences at places that differ. */
  readonly flags: ComputedRef<readonly PlaceFlag[]>
  readonly groups: ComputedRef<MappingTerms>
  readonly chain: ShallowRef<MappingDocument>
}

/** What follows from the mapping on the board: problems, terms, their groups, and the chain. */
export function useMappingConsequences(
  unit: Readonly<Ref<RepeatUnit>>,
  document: Readonly<Ref<MappingDocument>>,
  isPainting: () => boolean,
): MappingConsequences {
  const [beads, ofTerms, ofFlags, ofGroups, chain] = useFollowing(document, 5, isPainting)
  const problems = computed(() => checkMapping(unit.value, beads.value))
  const terms = computed(() => termsOf(unit.value, ofTerms.value))
  const flags = computed(() =>
    hasTooManyPlaces(unit.value, ofFlags.value) ? [] : placeFlags(unit.value, ofFlags.value),
  )
  // The same mapping has its terms derived once.
  const groups = computed(() =>
    ofGroups.value === terms.value.document ? terms.value : termsOf(unit.value, ofGroups.value),
  )
  return { beads, problems, terms, flags, groups, chain }
}

function termsOf(unit: RepeatUnit, document: MappingDocument): MappingTerms {
  return { document, terms: hasTooManyPlaces(unit, document) ? [] : deriveTerms(unit, document) }
}
