import { computed, shallowRef, watch, type ComputedRef } from 'vue'
import type { Distribution } from '@shared/contracts/distribution'
import type { Term } from '@shared/contracts/mapping'
import { straightAngleWarnings, type Warning } from '@shared/inversion'
import { findDistribution } from '@/api/distributions'
import { ApiError } from '@/api/http'

/**
 * Doubts about a dihedral one of whose two angles is often nearly straight, from the distributions of those angles at the same
 * state point. Angles without data, and ones that could not be loaded, say nothing.
 */
export function useStraightAngles(
  term: () => Term | null,
  terms: () => readonly Term[],
  statePointId: () => string | null,
): ComputedRef<readonly Warning[]> {
  const angles = computed(() => {
    const dihedral = term()
    return dihedral === null
      ? []
      : anglesOf(dihedral, terms()).filter((angle) => angle.distributionId !== null)
  })
  const question = computed(() =>
    JSON.stringify([statePointId(), angles.value.map(({ id, distributionId }) => [id, distributionId])]),
  )
  const found = shallowRef<readonly Distribution[]>([])

  watch(
    question,
    async (asked) => {
      found.value = []
      const at = statePointId()
      if (at === null || angles.value.length === 0) return
      const distributions = await Promise.all(angles.value.map(({ id }) => loaded(id, at)))
      if (asked === question.value) found.value = distributions.filter((each) => each !== null)
    },
    { immediate: true },
  )

  return computed(() =>
    straightAngleWarnings(
      found.value.map(({ kind, edges, weights, content, independentSamples }) => ({
        kind,
        edges: Float64Array.from(edges),
        weights: Float64Array.from(weights),
        content,
        independentSamples,
      })),
    ),
  )
}

async function loaded(termId: string, statePointId: string): Promise<Distribution | null> {
  try {
    return await findDistribution(termId, statePointId)
  } catch (failure) {
    if (!(failure instanceof ApiError)) throw failure
    return null
  }
}

/**
 * The angle terms a dihedral is made of: those that stand on its first or its last three beads somewhere along the chain, in
 * either direction; each once.
 */
export function anglesOf(dihedral: Term, terms: readonly Term[]): Term[] {
  if (dihedral.kind !== 'dihedral') return []
  const wanted = new Set(
    dihedral.places.flatMap((place) => [placeKey(place.slice(0, 3)), placeKey(place.slice(1))]),
  )
  return terms.filter(
    ({ kind, places }) => kind === 'angle' && places.some((place) => wanted.has(placeKey(place))),
  )
}

/** A row of beads wherever it starts along the chain and from whichever end it is read. */
function placeKey(place: Term['places'][number]): string {
  const from = (beads: Term['places'][number]) => {
    const least = Math.min(...beads.map(({ unit }) => unit))
    return beads.map(({ bead, unit }) => `${bead} ${unit - least}`).join(', ')
  }
  return [from(place), from([...place].reverse())].sort()[0]
}
