import { ref, shallowRef, type Ref, type ShallowRef } from 'vue'
import type { Point } from '@shared/chemistry'

/** What a pointer does to a drawing. Targets are named by what the drawing says about the element under the pointer. */
export interface StrokeActs {
  /** A stroke of painting begins on an atom of the unit. */
  readonly begin: (atom: number) => void
  readonly over: (atom: number) => void
  readonly end: () => void
  /** A target is pressed that is not painted by strokes, or with the modifier held. */
  readonly press: (target: number, modified: boolean) => boolean
  /** A loop was drawn around a part of the drawing. */
  readonly loop: (points: readonly Point[]) => void
  /** The drawing is pulled by so many px. */
  readonly pull: (right: number, down: number) => void
  /** A point of the window in units of the drawing. */
  readonly pointAt: (event: PointerEvent) => Point
}

/** The strokes of a pointer on the drawing. */
export interface CanvasStroke {
  readonly lasso: ShallowRef<readonly Point[]>
  readonly pulling: Ref<boolean>
  readonly down: (event: PointerEvent) => void
  readonly move: (event: PointerEvent) => void
  readonly stop: () => void
}

type Stroke = 'none' | 'paint' | 'lasso' | 'pull'

/**
 * Tells painting, drawing a loop and pulling apart: on an atom one paints, on empty ground one draws a loop, and with the middle
 * button one pulls.
 */
export function useCanvasStroke(acts: StrokeActs, readonly: () => boolean): CanvasStroke {
  const lasso = shallowRef<readonly Point[]>([])
  const pulling = ref(false)
  let stroke: Stroke = 'none'
  let last: Point = { x: 0, y: 0 }

  const down = (event: PointerEvent): void => {
    const left = event.button === 0
    // A finger on a drawing that is only looked at scrolls the page.
    if (event.button === 1 || (left && readonly() && event.pointerType !== 'touch')) {
      event.preventDefault()
      stroke = 'pull'
      pulling.value = true
      last = { x: event.clientX, y: event.clientY }
    } else if (left && !readonly()) {
      event.preventDefault()
      const element = (event.target as Element).closest('[data-target]')
      if (element === null) {
        stroke = 'lasso'
        lasso.value = [acts.pointAt(event)]
      } else if (!acts.press(Number(element.getAttribute('data-target')), event.shiftKey)) {
        stroke = 'paint'
        acts.begin(Number(element.getAttribute('data-atom')))
      }
    }
  }
  const move = (event: PointerEvent): void => {
    if (stroke === 'paint') {
      const element = document.elementFromPoint(event.clientX, event.clientY)?.closest('[data-atom]')
      const atom = Number(element?.getAttribute('data-atom') ?? NaN)
      if (Number.isInteger(atom)) acts.over(atom)
    } else if (stroke === 'lasso') {
      lasso.value = [...lasso.value, acts.pointAt(event)]
    } else if (stroke === 'pull') {
      acts.pull(event.clientX - last.x, event.clientY - last.y)
      last = { x: event.clientX, y: event.clientY }
    }
  }
  const stop = (): void => {
    if (stroke === 'paint') acts.end()
    if (stroke === 'lasso') acts.loop(lasso.value)
    stroke = 'none'
    pulling.value = false
    lasso.value = []
  }
  return { lasso, pulling, down, move, stop }
}
