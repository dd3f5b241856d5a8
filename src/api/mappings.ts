import type { Mapping, MappingCreate, MappingUpdate, Term } from '@shared/contracts/mapping'
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
