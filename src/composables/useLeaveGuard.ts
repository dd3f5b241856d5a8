import { ref, type Ref } from 'vue'
import { useEventListener } from '@vueuse/core'
import { onBeforeRouteLeave, onBeforeRouteUpdate } from 'vue-router'

/** Asks before a page with unsaved work is left: `asking` opens the question, `answer` lets go or stays. */
export function useLeaveGuard(unsaved: () => boolean): {
  asking: Ref<boolean>
  answer: (leave: boolean) => void
} {
  const asking = ref(false)
  let settle: (leave: boolean) => void = () => undefined

  const leave = (): boolean | Promise<boolean> => {
    if (!unsaved()) return true
    asking.value = true
    return new Promise((resolve) => (settle = resolve))
  }
  const answer = (goes: boolean): void => {
    asking.value = false
    settle(goes)
  }
  onBeforeRouteLeave(leave)
  onBeforeRouteUpdate(leave)
  useEventListener(window, 'beforeunload', (event: BeforeUnloadEvent) => {
    if (unsaved()) event.preventDefault()
  })
  return { asking, answer }
}
