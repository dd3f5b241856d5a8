import { shallowRef, watch, type ShallowRef } from 'vue'
import type { Distribution } from '@shared/contracts/distribution'
import type { StoredPotential } from '@shared/contracts/potential'
import { ApiError } from '@/api/http'
import { findDistribution, updateDistribution } from '@/api/distributions'
import { findPotential } from '@/api/potentials'

/** Which term at which state point. */
export interface BenchPlace {
  readonly termId: string
  readonly statePointId: string
}

/** What is stored of the term on the bench. */
export interface BenchTerm {
  readonly distribution: ShallowRef<Distribution | null>
  readonly potential: ShallowRef<StoredPotential | null>
  /** The place the two belong to; null until they are there. */
  readonly loaded: ShallowRef<BenchPlace | null>
  readonly error: ShallowRef<ApiError | null>
  readonly reload: () => Promise<void>
  /** States the number of independent samples of the distribution; null takes it back. */
  readonly stateSamples: (samples: number | null) => Promise<void>
}

/** Loads distribution and potential of a term whenever the place changes. Only the answer to the latest place counts. */
export function useBenchTerm(place: () => BenchPlace | null): BenchTerm {
  const distribution = shallowRef<Distribution | null>(null)
  const potential = shallowRef<StoredPotential | null>(null)
  const loaded = shallowRef<BenchPlace | null>(null)
  const error = shallowRef<ApiError | null>(null)
  let asked = 0

  const reload = async (): Promise<void> => {
    const question = ++asked
    const here = place()
    error.value = null
    if (here === null) return
    try {
      const [foundDistribution, foundPotential] = await Promise.all([
        findDistribution(here.termId, here.statePointId),
        findPotential(here.termId, here.statePointId),
      ])
      if (question !== asked) return
      distribution.value = foundDistribution
      potential.value = foundPotential
      loaded.value = here
    } catch (failure) {
      if (!(failure instanceof ApiError)) throw failure
      if (question === asked) error.value = failure
    }
  }

  const stateSamples = async (samples: number | null): Promise<void> => {
    const stated = distribution.value
    if (stated === null) return
    const updated = await updateDistribution(stated.id, { independentSamples: samples })
    if (distribution.value?.id === updated.id) distribution.value = updated
  }

  watch(
    () => JSON.stringify(place()),
    () => {
      loaded.value = null
      distribution.value = null
      potential.value = null
      void reload()
    },
    { immediate: true },
  )

  return { distribution, potential, loaded, error, reload, stateSamples }
}
