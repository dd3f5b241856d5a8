import { computed, type ComputedRef } from 'vue'
import { useRoute } from 'vue-router'
import type { Role } from '@shared/contracts/common'
import type { Membership } from '@shared/contracts/session'
import { useSessionStore } from '@/stores/session'

/** The group whose room is on screen, and what the signed-in person is in it. */
export function useGroup(): {
  groupId: ComputedRef<string>
  membership: ComputedRef<Membership | undefined>
  role: ComputedRef<Role | undefined>
  isOwner: ComputedRef<boolean>
} {
  const route = useRoute()
  const session = useSessionStore()

  const groupId = computed(() => String(route.params['groupId']))
  const membership = computed(() => session.membershipIn(groupId.value))
  const role = computed(() => membership.value?.role)
  return { groupId, membership, role, isOwner: computed(() => role.value === 'owner') }
}
