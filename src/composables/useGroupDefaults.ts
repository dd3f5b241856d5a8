import { computed, type ComputedRef } from 'vue'
import { HOUSE_DEFAULTS, type GroupDefaults } from '@shared/contracts/group'
import { useSessionStore } from '@/stores/session'
import { useWorkbenchStore } from '@/stores/workbench'

/** What holds in the group of the polymer on screen, or else in the current group. */
export function useGroupDefaults(): ComputedRef<GroupDefaults> {
  const session = useSessionStore()
  const workbench = useWorkbenchStore()

  return computed(() => {
    const group = session.membershipIn(workbench.polymer?.groupId) ?? session.currentGroup
    return group?.defaults ?? HOUSE_DEFAULTS
  })
}
