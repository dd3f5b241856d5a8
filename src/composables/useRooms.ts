import { computed, type ComputedRef } from 'vue'
import { useRoute, type RouteLocationRaw } from 'vue-router'
import { useWorkbenchStore } from '@/stores/workbench'
import { useRoomLinks, type RoomName } from './useRoomLinks'

const ROOMS: readonly { name: RoomName; text: string }[] = [
  { name: 'mapping', text: 'Mapping' },
  { name: 'intake', text: 'Intake' },
  { name: 'bench', text: 'Bench' },
  { name: 'correlation', text: 'Correlation' },
  { name: 'tables', text: 'Tables' },
]

export interface Room {
  name: RoomName | 'hand-overs'
  text: string
  to: RouteLocationRaw
  current: boolean
}

/** The rooms of the mapping on screen, with the one we are in. */
export function useRooms(): ComputedRef<Room[]> {
  const route = useRoute()
  const workbench = useWorkbenchStore()
  const { roomLink } = useRoomLinks()

  return computed(() => {
    if (!('mappingId' in route.params) || !workbench.mapping) return []
    const { polymer, mapping, statePoint } = workbench
    return [
      ...ROOMS.map(({ name, text }) => ({ name, text, to: roomLink(name), current: route.name === name })),
      {
        name: 'hand-overs',
        text: 'Hand-over',
        to: {
          name: 'hand-overs',
          params: { polymerId: polymer?.id ?? '' },
          query: { mapping: mapping.id, ...(statePoint ? { statePoint: statePoint.id } : {}) },
        },
        current: false,
      },
    ]
  })
}
