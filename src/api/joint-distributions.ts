import type {
  DecisionWrite,
  JointDistribution,
  JointDistributionUpload,
  Pair,
} from '@shared/contracts/distribution'
import type { JointTableQuery } from '@shared/contracts/potential'
import { apiUrl, http, uploadForm } from './http'

/** Pairs of terms that share a bead, bonds with angles first, with what is known of each at one state point. */
export const listPairs = async (mappingId: string, statePointId: string): Promise<Pair[]> =>
  (await http.get<{ pairs: Pair[] }>(`/mappings/${mappingId}/pairs`, { query: { statePoint: statePointId } }))
    .pairs

export const storeJointDistribution = (
  mappingId: string,
  file: File,
  upload: JointDistributionUpload,
  signal?: AbortSignal,
): Promise<JointDistribution> =>
  http.post(`/mappings/${mappingId}/joint-distributions`, {
    form: uploadForm(file, { settings: upload }),
    signal,
  })

export const getJointDistribution = (jointDistributionId: string): Promise<JointDistribution> =>
  http.get(`/joint-distributions/${jointDistributionId}`)

export const deleteJointDistribution = (jointDistributionId: string): Promise<undefined> =>
  http.delete(`/joint-distributions/${jointDistributionId}`)

export const recordDecision = (
  jointDistributionId: string,
  decision: DecisionWrite,
): Promise<JointDistribution> =>
  http.put(`/joint-distributions/${jointDistributionId}/decision`, { json: decision })

/** Address of the table of the joint potential as a file; follow it to download. */
export const jointTableUrl = (jointDistributionId: string, query: JointTableQuery): string =>
  apiUrl(`/joint-distributions/${jointDistributionId}/table`, { ...query })

export const jointDistributionFileUrl = (jointDistributionId: string): string =>
  apiUrl(`/joint-distributions/${jointDistributionId}/file`)
