import type { RouteLocationRaw } from 'vue-router'
import { useWorkbenchStore } from '@/stores/workbench'

export type RoomName = 'mapping' | 'intake' | 'bench' | 'correlation' | 'tables'

interface RoomLinkOptions {
  readonly mappingId?: string
  readonly statePointId?: string
  readonly params?: Record<string, string>
  readonly query?: Record<string, string>
}

/** Addresses of the rooms around the mapping on screen, at the state point on screen. */
export function useRoomLinks(): {
  roomLink: (room: RoomName, options?: RoomLinkOptions) => RouteLocationRaw
} {
  const workbench = useWorkbenchStore()

  const roomLink = (room: RoomName, options: RoomLinkOptions = {}): RouteLocationRaw => {
    const statePoint = options.statePointId ?? workbench.statePoint?.id
    return {
      name: room,
      params: {
        polymerId: workbench.polymer?.id ?? '',
        mappingId: options.mappingId ?? workbench.mapping?.id ?? '',
        ...options.params,
      },
      query: { ...(statePoint ? { statePoint } : {}), ...options.query },
    }
  }

  return { roomLink }
}
