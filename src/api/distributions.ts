import type { Distribution, DistributionUpdate, DistributionUpload } from '@shared/contracts/distribution'
import { apiUrl, http, uploadForm } from './http'

/** Files of parts of a distribution: stretches of time in their order, or single chains. */
export type PartFiles = { readonly blocks: readonly File[] } | { readonly chains: readonly File[] }

/** Stores a file as the distribution of a term at a state point, with files of its parts; an earlier one is superseded. */
export const storeDistribution = (
  termId: string,
  file: File,
  upload: DistributionUpload,
  parts?: PartFiles,
  signal?: AbortSignal,
): Promise<Distribution> =>
  http.post(`/terms/${termId}/distributions`, { form: uploadForm(file, { settings: upload }, parts), signal })

export const findDistribution = (termId: string, statePointId: string): Promise<Distribution | null> =>
  http.find(`/terms/${termId}/distribution`, { query: { statePoint: statePointId } })

export const updateDistribution = (
  distributionId: string,
  change: DistributionUpdate,
): Promise<Distribution> => http.patch(`/distributions/${distributionId}`, { json: change })

export const deleteDistribution = (distributionId: string): Promise<undefined> =>
  http.delete(`/distributions/${distributionId}`)

/** Address of the file as it came. */
export const distributionFileUrl = (distributionId: string): string =>
  apiUrl(`/distributions/${distributionId}/file`)
