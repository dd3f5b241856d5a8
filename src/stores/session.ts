import { computed, ref, shallowRef } from 'vue'
import { defineStore } from 'pinia'
import type { Role } from '@shared/contracts/common'
import type { JoinNew, PasswordChange } from '@shared/contracts/people'
import type { DemoUser, Membership, SetUp, SignedInUser, SignIn } from '@shared/contracts/session'
import { setCsrfToken } from '@/api/http'
import * as people from '@/api/people'
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

  /** The group whose work is shown where an address names none. */
  const currentGroup = computed<Membership | undefined>(
    () => membershipIn(user.value?.currentGroupId ?? undefined) ?? memberships.value.at(0),
  )

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
  /** Remembers the group whose work is looked at; one that the person is not in changes nothing. */
  const chooseGroup = async (groupId: string): Promise<void> => {
    if (!user.value || !membershipIn(groupId) || currentGroup.value?.groupId === groupId) return
    user.value = { ...user.value, currentGroupId: groupId }
    await people.chooseGroup(groupId)
  }
  const joinNew = async (token: string, details: JoinNew): Promise<void> => {
    await people.joinNew(token, details)
    await load()
  }
  const join = async (token: string): Promise<void> => {
    await people.join(token)
    await load()
  }
  const rename = async (name: string): Promise<void> => {
    await people.updateAccount({ name })
    await load()
  }
  /** The session goes on under a new token; other browsers are signed out. */
  const changePassword = async (change: PasswordChange): Promise<void> => {
    await people.changePassword(change)
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
    currentGroup,
    load,
    signIn,
    signInDemo,
    setUp,
    signOut,
    chooseGroup,
    joinNew,
    join,
    rename,
    changePassword,
    forget,
  }
})
