import type { Mapping, MappingCreate, MappingDocument, MappingUpdate, Term } from '@shared/contracts/mapping'
import type { MappingCoverage } from '@shared/contracts/mapping-coverage'
import type { MappingFit, MappingVersion } from '@shared/contracts/mapping-version'
import type { TermEvidence } from '@shared/contracts/term-evidence'
import { http } from './http'

export const listMappings = async (polymerId: string): Promise<Mapping[]> =>
  (await http.get<{ mappings: Mapping[] }>(`/polymers/${polymerId}/mappings`)).mappings

export const createMapping = (polymerId: string, mapping: MappingCreate): Promise<Mapping> =>
  http.post(`/polymers/${polymerId}/mappings`, { json: mapping })

export const getMapping = (mappingId: string): Promise<Mapping> => http.get(`/mappings/${mappingId}`)

/** 409 CONFLICT with the current mapping in the error's `details` when someone else saved in between. */
export const saveMapping = (mappingId: string, change: MappingUpdate): Promise<Mapping> =>
  http.put(`/mappings/${mappingId}`, { json: change })

export const deleteMapping = (mappingId: string): Promise<undefined> => http.delete(`/mappings/${mappingId}`)

/** The terms of a mapping with their standing at one state point. */
export const listTerms = async (mappingId: string, statePointId: string | null): Promise<Term[]> =>
  (await http.get<{ terms: Term[] }>(`/mappings/${mappingId}/terms`, { query: { statePoint: statePointId } }))
    .terms

/** Which terms have data at which state points. */
export const getCoverage = (mappingId: string): Promise<MappingCoverage> =>
  http.get(`/mappings/${mappingId}/coverage`)

/** The earlier versions, the newest first. */
export const listVersions = async (mappingId: string): Promise<MappingVersion[]> =>
  (await http.get<{ versions: MappingVersion[] }>(`/mappings/${mappingId}/versions`)).versions

/** What saving a document would do to the data; nothing is saved. */
export const previewFit = (mappingId: string, document: MappingDocument): Promise<MappingFit> =>
  http.post(`/mappings/${mappingId}/fit`, { json: { document } })

/** What data say about which terms to use. */
export const getEvidence = (mappingId: string, statePoint: string): Promise<TermEvidence> =>
  http.get(`/mappings/${mappingId}/evidence`, { query: { statePoint } })
