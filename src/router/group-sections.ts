import type { RouteRecordRaw } from 'vue-router'
import type { Role } from '@shared/contracts/common'

/** A part of the room "Group": its address below /groups/:groupId, its word in the navigation, and whom it is for. */
interface GroupSection {
  readonly path: string
  readonly name: string
  readonly text: string
  readonly roles: readonly Role[]
  readonly component: RouteRecordRaw['component']
}

const READERS: readonly Role[] = ['owner', 'modeller', 'reviewer']
const EVERYONE: readonly Role[] = [...READERS, 'collaborator']

/** In the order of the navigation. */
export const GROUP_SECTIONS: readonly GroupSection[] = [
  {
    path: 'members',
    name: 'group-members',
    text: 'Members',
    roles: EVERYONE,
    component: () => import('@/views/GroupMembersView.vue'),
  },
  {
    path: 'invitations',
    name: 'group-invitations',
    text: 'Invitations',
    roles: ['owner'],
    component: () => import('@/views/GroupInvitationsView.vue'),
  },
  {
    path: 'defaults',
    name: 'group-defaults',
    text: 'Defaults',
    roles: READERS,
    component: () => import('@/views/GroupDefaultsView.vue'),
  },
  {
    path: 'layouts/:layoutId?',
    name: 'group-layouts',
    text: 'Layouts',
    roles: READERS,
    component: () => import('@/views/GroupLayoutsView.vue'),
  },
  {
    path: 'history',
    name: 'group-history',
    text: 'History',
    roles: READERS,
    component: () => import('@/views/GroupHistoryView.vue'),
  },
]

/** The addresses of the room "Group". */
export const groupRoutes: RouteRecordRaw[] = [
  {
    path: '',
    name: 'group',
    redirect: (to) => ({ name: 'group-members', params: to.params }),
  },
  ...GROUP_SECTIONS.map(({ path, name, text, component }) => ({
    path,
    name,
    component: component!,
    meta: { title: text },
  })),
]
