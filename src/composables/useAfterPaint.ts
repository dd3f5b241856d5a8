import { onScopeDispose, shallowRef, watch, type ShallowRef } from 'vue'

/** Numbers that change faster are not read anyway. */
const LEAST_MILLISECONDS = 100

/**
 * Follows a value, but only after the frame that first shows it elsewhere has been painted, and ten times a second at most. What is
 * read at leisure, as the notes beside a figure, then does not hold up the figure under a moving slider. Only the newest value
 * is taken; the first one and null are taken at once.
 */
export function useAfterPaint<Value>(source: () => Value | null): Readonly<ShallowRef<Value | null>> {
  const followed = shallowRef(source()) as ShallowRef<Value | null>
  let frame: number | null = null
  let timer: ReturnType<typeof setTimeout> | undefined
  let takenAt = -Infinity

  const forget = (): void => {
    if (frame !== null) cancelAnimationFrame(frame)
    clearTimeout(timer)
    frame = null
  }
  const take = (): void => {
    frame = null
    takenAt = performance.now()
    followed.value = source()
  }
  watch(
    source,
    (next) => {
      if (next === null || followed.value === null) {
        forget()
        followed.value = next
      } else {
        // The callback of a frame runs before it is painted, a timer set there after.
        frame ??= requestAnimationFrame((now) => {
          timer = setTimeout(take, Math.max(0, takenAt + LEAST_MILLISECONDS - now))
        })
      }
    },
    { flush: 'sync' },
  )
  onScopeDispose(forget)
  return followed
}
