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
  readonly terms: ComputedRef<MappingTerms & { readonly flags: readonly PlaceFlag[] }>
  readonly groups: ComputedRef<MappingTerms>
  readonly chain: ShallowRef<MappingDocument>
}

/** What follows from the mapping on the board: problems, terms, their groups, and the chain. */
export function useMappingConsequences(
  unit: Readonly<Ref<RepeatUnit>>,
  document: Readonly<Ref<MappingDocument>>,
  isPainting: () => boolean,
): MappingConsequences {
  const [beads, ofTerms, ofGroups, chain] = useFollowing(document, 4, isPainting)
  const problems = computed(() => checkMapping(unit.value, beads.value))
  const terms = computed(() => {
    const listed = termsOf(unit.value, ofTerms.value)
    return { ...listed, flags: listed.terms.length === 0 ? [] : placeFlags(unit.value, listed.document) }
  })
  // The same mapping has its terms derived once.
  const groups = computed(() =>
    ofGroups.value === terms.value.document ? terms.value : termsOf(unit.value, ofGroups.value),
  )
  return { beads, problems, terms, groups, chain }
}

function termsOf(unit: RepeatUnit, document: MappingDocument): MappingTerms {
  return { document, terms: hasTooManyPlaces(unit, document) ? [] : deriveTerms(unit, document) }
}
