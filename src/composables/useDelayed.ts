import { onScopeDispose, readonly, ref, watch, type Ref } from 'vue'

/** True once a state has held for a while: what is quick shows nothing in between. */
export function useDelayed(state: () => boolean, milliseconds: number): Readonly<Ref<boolean>> {
  const held = ref(false)
  let timer: ReturnType<typeof setTimeout> | undefined
  watch(
    state,
    (on) => {
      clearTimeout(timer)
      held.value = false
      if (on) timer = setTimeout(() => (held.value = true), milliseconds)
    },
    { immediate: true },
  )
  onScopeDispose(() => clearTimeout(timer))
  return readonly(held)
}
