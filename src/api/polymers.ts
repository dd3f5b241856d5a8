import type { Polymer, PolymerCreate, PolymerUpdate } from '@shared/contracts/polymer'
import { http } from './http'

export const listPolymers = async (groupId: string): Promise<Polymer[]> =>
  (await http.get<{ polymers: Polymer[] }>(`/groups/${groupId}/polymers`)).polymers

export const createPolymer = (groupId: string, polymer: PolymerCreate): Promise<Polymer> =>
  http.post(`/groups/${groupId}/polymers`, { json: polymer })

export const getPolymer = (polymerId: string): Promise<Polymer> => http.get(`/polymers/${polymerId}`)

export const updatePolymer = (polymerId: string, change: PolymerUpdate): Promise<Polymer> =>
  http.patch(`/polymers/${polymerId}`, { json: change })

export const deletePolymer = (polymerId: string): Promise<undefined> => http.delete(`/polymers/${polymerId}`)
