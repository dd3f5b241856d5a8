import { computed, ref, shallowRef } from 'vue'
import { defineStore } from 'pinia'
import type { Role } from '@shared/contracts/common'
import type { DemoUser, Membership, SetUp, SignedInUser, SignIn } from '@shared/contracts/session'
import { setCsrfToken } from '@/api/http'
import * as api from '@/api/session'

const WRITING_ROLES: readonly Role[] = ['owner', 'modeller']

/** Who is signed in, in which groups and with which role. */
export const useSessionStore = defineStore('session', () => {
  const user = shallowRef<SignedInUser | null>(null)
  const demoUsers = shallowRef<readonly DemoUser[]>([])
  const loaded = ref(false)

  const memberships = computed<readonly Membership[]>(() => user.value?.memberships ?? [])
  /** Groups where something can be seen: a collaborator sees nothing yet. */
  const readableGroups = computed(() => memberships.value.filter(({ role }) => role !== 'collaborator'))
  const writableGroups = computed(() => memberships.value.filter(({ role }) => WRITING_ROLES.includes(role)))

  const membershipIn = (groupId: string | undefined): Membership | undefined =>
    memberships.value.find((membership) => membership.groupId === groupId)
  /** Whether the person may write in a group (owner or modeller). */
  const canWrite = (groupId: string | undefined): boolean => {
    const role = membershipIn(groupId)?.role
    return role !== undefined && WRITING_ROLES.includes(role)
  }

  const load = async (): Promise<void> => {
    const session = await api.getSession()
    setCsrfToken(session.csrfToken)
    user.value = session.user
    demoUsers.value = session.demoUsers
    loaded.value = true
  }
  const signIn = async (credentials: SignIn): Promise<void> => {
    await api.signIn(credentials)
    await load()
  }
  const signInDemo = async (userId: string): Promise<void> => {
    await api.signInDemo({ userId })
    await load()
  }
  const setUp = async (details: SetUp): Promise<void> => {
    await api.setUp(details)
    await load()
  }
  const signOut = async (): Promise<void> => {
    await api.signOut()
    await load()
  }
  /** The server no longer knows this session. */
  const forget = (): void => {
    user.value = null
  }

  return {
    user,
    demoUsers,
    loaded,
    memberships,
    readableGroups,
    writableGroups,
    membershipIn,
    canWrite,
    load,
    signIn,
    signInDemo,
    setUp,
    signOut,
    forget,
  }
})
