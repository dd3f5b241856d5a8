import type { PotentialSave, StoredPotential } from '@shared/contracts/potential'
import { http } from './http'

export const findPotential = (termId: string, statePointId: string): Promise<StoredPotential | null> =>
  http.find(`/terms/${termId}/potential`, { query: { statePoint: statePointId } })

/** 409 CONFLICT with the stored potential in the error's `details` when someone else saved in between. */
export const savePotential = (termId: string, potential: PotentialSave): Promise<StoredPotential> =>
  http.put(`/terms/${termId}/potential`, { json: potential })

export const deletePotential = (potentialId: string): Promise<undefined> =>
  http.delete(`/potentials/${potentialId}`)
