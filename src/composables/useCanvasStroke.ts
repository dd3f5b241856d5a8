import { ref, shallowRef, type Ref, type ShallowRef } from 'vue'
import type { Point } from '@shared/chemistry'

/** What a pointer does to a drawing. Targets are named by what the drawing says about the element under the pointer. */
export interface StrokeActs {
  /** A stroke of painting begins on an atom of the unit. */
  readonly begin: (atom: number) => void
  readonly over: (atom: number) => void
  readonly end: () => void
  /** What the stroke painted is dropped: it was the first finger of two. */
  readonly drop: () => void
  /** A target is pressed that is not painted by strokes, or with the modifier held. */
  readonly press: (target: number, modified: boolean) => boolean
  /** A loop was drawn around a part of the drawing. */
  readonly loop: (points: readonly Point[]) => void
  /** The drawing is pulled by so many px. */
  readonly pull: (right: number, down: number) => void
  /** Two fingers move apart or together about a point of the window. */
  readonly pinch: (factor: number, about: WindowPoint) => void
  /** A point of the window in units of the drawing. */
  readonly pointAt: (point: WindowPoint) => Point
  /** The atom of the unit at a point of the drawing. */
  readonly atomAt: (point: Point) => number | null
}

/** px from the upper left corner of the window. */
export type WindowPoint = Pick<MouseEvent, 'clientX' | 'clientY'>

/** The strokes of a pointer on the drawing. */
export interface CanvasStroke {
  readonly lasso: ShallowRef<readonly Point[]>
  readonly pulling: Ref<boolean>
  readonly down: (event: PointerEvent) => void
  readonly move: (event: PointerEvent) => void
  readonly stop: (event: PointerEvent) => void
}

type Stroke = 'none' | 'paint' | 'lasso' | 'pull' | 'pinch'

/** A quick hand leaves gaps between two events; atoms in them are looked for at this distance, units of the drawing. */
const GAP = 10

/**
 * Tells painting, drawing a loop and pulling apart: on an atom one paints, on empty ground one draws a loop, with the middle
 * button one pulls, and two fingers pull and magnify.
 */
export function useCanvasStroke(acts: StrokeActs, readonly: () => boolean): CanvasStroke {
  const lasso = shallowRef<readonly Point[]>([])
  const pulling = ref(false)
  const fingers = new Map<number, WindowPoint>()
  let stroke: Stroke = 'none'
  let last: WindowPoint = { clientX: 0, clientY: 0 }

  const down = (event: PointerEvent): void => {
    // A finger on a drawing that is only looked at scrolls the page.
    if (event.pointerType === 'touch') {
      if (readonly()) return
      fingers.set(event.pointerId, placeOf(event))
      if (fingers.size > 1) {
        event.preventDefault()
        beginPinch()
        return
      }
    }
    last = placeOf(event)
    // A stroke goes on over what lies on the drawing, and when it leaves it for a moment.
    ;(event.currentTarget as Element).setPointerCapture(event.pointerId)
    if (event.button === 1 || (event.button === 0 && readonly())) {
      event.preventDefault()
      stroke = 'pull'
      pulling.value = true
    } else if (event.button === 0) {
      event.preventDefault()
      beginStroke(event)
    }
  }
  const beginStroke = (event: PointerEvent): void => {
    const element = (event.target as Element).closest('[data-target]')
    if (element === null) {
      stroke = 'lasso'
      lasso.value = [acts.pointAt(event)]
    } else if (!acts.press(Number(element.getAttribute('data-target')), event.shiftKey)) {
      stroke = 'paint'
      acts.begin(Number(element.getAttribute('data-atom')))
    }
  }
  const beginPinch = (): void => {
    if (stroke === 'paint') acts.drop()
    lasso.value = []
    stroke = 'pinch'
  }

  const move = (event: PointerEvent): void => {
    const place = placeOf(event)
    if (stroke === 'paint') paintTo(place)
    else if (stroke === 'lasso') lasso.value = [...lasso.value, acts.pointAt(place)]
    else if (stroke === 'pull') acts.pull(place.clientX - last.clientX, place.clientY - last.clientY)
    else if (stroke === 'pinch') movePinch(event.pointerId, place)
    last = place
  }
  const paintTo = (place: WindowPoint): void => {
    const [from, to] = [acts.pointAt(last), acts.pointAt(place)]
    const steps = Math.max(1, Math.ceil(Math.hypot(to.x - from.x, to.y - from.y) / GAP))
    for (let step = 1; step <= steps; step++) {
      const [x, y] = [from.x + (step / steps) * (to.x - from.x), from.y + (step / steps) * (to.y - from.y)]
      const atom = acts.atomAt({ x, y })
      if (atom !== null) acts.over(atom)
    }
  }
  const movePinch = (finger: number, place: WindowPoint): void => {
    if (fingers.size !== 2 || !fingers.has(finger)) return
    const before = spanOf([...fingers.values()])
    fingers.set(finger, place)
    const after = spanOf([...fingers.values()])
    acts.pull(after.clientX - before.clientX, after.clientY - before.clientY)
    if (before.length > 0 && after.length > 0) acts.pinch(after.length / before.length, after)
  }

  const stop = (event: PointerEvent): void => {
    fingers.delete(event.pointerId)
    // The finger that is left paints nothing before it is lifted, too.
    if (stroke === 'pinch' && fingers.size > 0) return
    if (stroke === 'paint') acts.end()
    if (stroke === 'lasso') acts.loop(lasso.value)
    stroke = 'none'
    pulling.value = false
    lasso.value = []
  }
  return { lasso, pulling, down, move, stop }
}

function placeOf({ clientX, clientY }: WindowPoint): WindowPoint {
  return { clientX, clientY }
}

/** The middle between two fingers and how far they are apart. */
function spanOf([one, other]: readonly WindowPoint[]): WindowPoint & { readonly length: number } {
  return {
    clientX: (one.clientX + other.clientX) / 2,
    clientY: (one.clientY + other.clientY) / 2,
    length: Math.hypot(other.clientX - one.clientX, other.clientY - one.clientY),
  }
}
