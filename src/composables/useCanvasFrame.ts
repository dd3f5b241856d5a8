import { computed, ref, toValue, watch, type ComputedRef, type MaybeRefOrGetter } from 'vue'
import type { Point } from '@shared/chemistry'

/** A rectangle of the drawing, in its own units. */
interface Frame extends Point {
  readonly width: number
  readonly height: number
}

/** What of a drawing is seen. */
export interface CanvasFrame {
  readonly frame: ComputedRef<Frame>
  /** Whether more than everything, or not everything, is seen. */
  readonly moved: ComputedRef<boolean>
  /** Magnifies about a point of the drawing, which stays where it is; about the middle when left out. */
  readonly zoom: (factor: number, about?: Point) => void
  /** Moves what is seen, by shares of its width and height. */
  readonly pan: (right: number, down: number) => void
  readonly fit: () => void
  /** Moves as little as needed for a point to be seen. */
  readonly reveal: (point: Point) => void
}

export const ZOOM_STEP = 1.25
const [LEAST_ZOOM, MOST_ZOOM] = [0.5, 6]
/** Room kept around a point that is shown, in units of the drawing. */
const REVEAL_ROOM = 30

/**
 * The part of a drawing that a window shows: at first as much as fits, and never magnified by that.
 *
 * @param box what the drawing takes
 * @param size of the window in px
 * @param above room kept free above the drawing, px
 */
export function useCanvasFrame(
  box: MaybeRefOrGetter<Frame>,
  size: MaybeRefOrGetter<{ readonly width: number; readonly height: number }>,
  above: number,
): CanvasFrame {
  const factor = ref(1)
  const shift = ref<Point>({ x: 0, y: 0 })

  const fitted = computed<Frame>(() => {
    const drawing = toValue(box)
    const { width, height } = toValue(size)
    if (width === 0 || height === 0) return drawing
    const scale = Math.min(1, width / drawing.width, (height - above) / drawing.height)
    const [wide, high, top] = [width, height, above].map((length) => length / scale)
    return {
      x: drawing.x - (wide - drawing.width) / 2,
      y: drawing.y - top - (high - top - drawing.height) / 2,
      width: wide,
      height: high,
    }
  })
  const frame = computed<Frame>(() => {
    const { x, y, width, height } = fitted.value
    const [wide, high] = [width / factor.value, height / factor.value]
    return {
      x: x + (width - wide) / 2 + shift.value.x,
      y: y + (height - high) / 2 + shift.value.y,
      width: wide,
      height: high,
    }
  })

  const fit = (): void => {
    factor.value = 1
    shift.value = { x: 0, y: 0 }
  }
  const moveBy = (x: number, y: number): void => {
    shift.value = { x: shift.value.x + x, y: shift.value.y + y }
  }
  const zoom = (by: number, about?: Point): void => {
    const before = frame.value
    const point = about ?? { x: before.x + before.width / 2, y: before.y + before.height / 2 }
    factor.value = Math.min(MOST_ZOOM, Math.max(LEAST_ZOOM, factor.value * by))
    const after = frame.value
    const share = { x: (point.x - before.x) / before.width, y: (point.y - before.y) / before.height }
    moveBy(point.x - after.x - share.x * after.width, point.y - after.y - share.y * after.height)
  }
  const pan = (right: number, down: number): void =>
    moveBy(right * frame.value.width, down * frame.value.height)
  const reveal = (point: Point): void => {
    const { x, y, width, height } = frame.value
    const missing = (at: number, from: number, length: number): number =>
      Math.max(0, at + REVEAL_ROOM - from - length) - Math.max(0, from + REVEAL_ROOM - at)
    moveBy(missing(point.x, x, width), missing(point.y, y, height))
  }
  // Another drawing, or the same one turned, is seen whole again.
  watch(() => toValue(box), fit)

  return {
    frame,
    moved: computed(() => factor.value !== 1 || shift.value.x !== 0 || shift.value.y !== 0),
    zoom,
    pan,
    fit,
    reveal,
  }
}
