import { shallowRef, watch, type Ref, type ShallowRef } from 'vue'
import { tryOnScopeDispose } from '@vueuse/core'

/**
 * Lets what follows from a value lag behind it while a hand moves, so that no frame has all of it to do: in each frame one
 * follower takes over the value of that moment, the one that waits longest. At other times all of them take it at once.
 *
 * @param source what is followed
 * @param count of followers
 * @param isMoving whether a hand moves now
 */
export function useFollowing<Value>(
  source: Readonly<Ref<Value>>,
  count: number,
  isMoving: () => boolean,
): ShallowRef<Value>[] {
  const followers = Array.from({ length: count }, () => shallowRef(source.value))
  let turn = 0
  let frame: number | null = null

  const askForFrame = (): void => {
    frame ??= requestAnimationFrame(takeTurn)
  }
  const takeTurn = (): void => {
    frame = null
    const order = followers.map((_, place) => followers[(turn + place) % count])
    const late = order.filter((follower) => follower.value !== source.value)
    if (late.length === 0) return
    turn = (followers.indexOf(late[0]) + 1) % count
    late[0].value = source.value
    if (late.length > 1) askForFrame()
  }
  watch(
    source,
    (value) => {
      if (isMoving()) askForFrame()
      else for (const follower of followers) follower.value = value
    },
    { flush: 'sync' },
  )
  tryOnScopeDispose(() => {
    if (frame !== null) cancelAnimationFrame(frame)
  })
  return followers
}
