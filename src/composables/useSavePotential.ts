import { ref, shallowRef, type Ref, type ShallowRef } from 'vue'
import type { StoredPotential } from '@shared/contracts/potential'
import { potentialSchema } from '@shared/contracts/potential'
import type { InversionSettings } from '@shared/inversion'
import { ApiError } from '@/api/http'
import { savePotential } from '@/api/potentials'
import type { BenchPlace } from './useBenchTerm'

/** Saving, and what came in between. */
export interface PotentialSaving {
  readonly saving: Ref<boolean>
  /** What someone else saved in between; a choice has to be made. */
  readonly conflict: ShallowRef<StoredPotential | null>
  readonly error: ShallowRef<ApiError | null>
  /** Since when changes could not be saved. */
  readonly failedAt: ShallowRef<Date | null>
  /** True when the potential was saved. */
  readonly save: (place: BenchPlace, settings: InversionSettings, revision: number | null) => Promise<boolean>
  readonly forget: () => void
}

/**
 * Saves the potential of a term. When someone else saved in between nothing is overwritten: their version is put into
 * `conflict` for a person to choose.
 */
export function useSavePotential(onSaved: (potential: StoredPotential) => void): PotentialSaving {
  const saving = ref(false)
  const conflict = shallowRef<StoredPotential | null>(null)
  const error = shallowRef<ApiError | null>(null)
  const failedAt = shallowRef<Date | null>(null)

  const forget = (): void => {
    conflict.value = null
    error.value = null
    failedAt.value = null
  }

  const fail = (failure: ApiError): void => {
    const theirs = potentialSchema.safeParse(failure.body.details)
    if (failure.code === 'CONFLICT' && theirs.success) {
      conflict.value = theirs.data
      return
    }
    error.value = failure
    failedAt.value ??= new Date()
  }

  const save: PotentialSaving['save'] = async (place, settings, revision) => {
    saving.value = true
    error.value = null
    try {
      const saved = await savePotential(place.termId, {
        statePointId: place.statePointId,
        revision,
        settings,
      })
      forget()
      onSaved(saved)
      return true
    } catch (failure) {
      if (!(failure instanceof ApiError)) throw failure
      fail(failure)
      return false
    } finally {
      saving.value = false
    }
  }

  return { saving, conflict, error, failedAt, save, forget }
}
