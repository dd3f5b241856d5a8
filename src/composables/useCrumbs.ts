import { computed, shallowRef, type ComputedRef } from 'vue'
import { useRoute, type RouteLocationRaw } from 'vue-router'
import type { Polymer } from '@shared/contracts/polymer'
import { listPolymers } from '@/api/polymers'
import { statePointDescription, statePointName } from '@/format/state-point'
import { useWorkbenchStore } from '@/stores/workbench'
import { useRoomLinks, type RoomName } from './useRoomLinks'

export interface Crumb {
  kind: 'polymer' | 'mapping' | 'state point'
  label: string
  items: { key: string; text: string; to: RouteLocationRaw; current: boolean }[]
  all: { text: string; to: RouteLocationRaw }
}

/** The crumbs of the header: the polymer on screen, its mapping, the state point, and what stands beside each. */
export function useCrumbs(): { crumbs: ComputedRef<Crumb[]>; loadPolymers: () => Promise<void> } {
  const route = useRoute()
  const workbench = useWorkbenchStore()
  const { roomLink } = useRoomLinks()
  const polymers = shallowRef<readonly Polymer[]>([])

  /** The other polymers of the group, asked for when the menu opens. */
  const loadPolymers = async (): Promise<void> => {
    const groupId = workbench.polymer?.groupId
    if (groupId !== undefined) polymers.value = await listPolymers(groupId)
  }

  const room = computed<RoomName>(() => (route.name as RoomName | undefined) ?? 'mapping')
  const inMapping = computed(() => 'mappingId' in route.params && workbench.mapping !== null)

  const crumbs = computed<Crumb[]>(() => {
    const { polymer, mapping, statePoint } = workbench
    if (!('polymerId' in route.params) || !polymer) return []
    const known = polymers.value.some(({ id }) => id === polymer.id) ? polymers.value : [polymer]
    const polymerRoom = { name: 'polymer', params: { polymerId: polymer.id } }
    const polymerCrumb: Crumb = {
      kind: 'polymer',
      label: polymer.name,
      items: known.map(({ id, name }) => ({
        key: id,
        text: name,
        to: { name: 'polymer', params: { polymerId: id } },
        current: id === polymer.id,
      })),
      all: { text: 'Front desk', to: { name: 'front-desk' } },
    }
    if (!inMapping.value || !mapping) return [polymerCrumb]
    const mappingCrumb: Crumb = {
      kind: 'mapping',
      label: mapping.name,
      items: workbench.mappings.map(({ id, name }) => ({
        key: id,
        text: name,
        to: roomLink(room.value, { mappingId: id }),
        current: id === mapping.id,
      })),
      all: { text: 'All mappings of the polymer', to: { ...polymerRoom, hash: '#mappings' } },
    }
    const statePointCrumb: Crumb = {
      kind: 'state point',
      label: statePoint ? statePointName(statePoint) : 'no state point',
      items: workbench.statePoints.map((each) => ({
        key: each.id,
        text: statePointDescription(each),
        to: { name: route.name!, params: route.params, query: { ...route.query, statePoint: each.id } },
        current: each.id === statePoint?.id,
      })),
      all: { text: 'All state points', to: { ...polymerRoom, hash: '#state-points' } },
    }
    return [polymerCrumb, mappingCrumb, statePointCrumb]
  })

  return { crumbs, loadPolymers }
}
