import type { StatePoint, StatePointCreate, StatePointUpdate } from '@shared/contracts/polymer'
import { http } from './http'

export const listStatePoints = async (polymerId: string): Promise<StatePoint[]> =>
  (await http.get<{ statePoints: StatePoint[] }>(`/polymers/${polymerId}/state-points`)).statePoints

export const createStatePoint = (polymerId: string, statePoint: StatePointCreate): Promise<StatePoint> =>
  http.post(`/polymers/${polymerId}/state-points`, { json: statePoint })

export const updateStatePoint = (statePointId: string, change: StatePointUpdate): Promise<StatePoint> =>
  http.patch(`/state-points/${statePointId}`, { json: change })

export const deleteStatePoint = (statePointId: string): Promise<undefined> =>
  http.delete(`/state-points/${statePointId}`)
