import { computed, type ComputedRef } from 'vue'
import { useLocalStorage } from '@vueuse/core'
import { z } from 'zod'
import type { Isometry } from '@shared/chemistry'

/** One nudge of the drawing. */
export const TURN_STEP = 30

const turnSchema = z.object({ degrees: z.number(), mirrored: z.boolean() })
const LEVEL = { degrees: 0, mirrored: false }

/** How a person turned the drawing of a polymer; kept in the browser, since it changes nothing but the view. */
export interface DrawingTurn {
  readonly turn: ComputedRef<Isometry>
  readonly turned: ComputedRef<boolean>
  /** Turns on by one step, clockwise. */
  readonly rotate: () => void
  readonly mirror: () => void
  readonly level: () => void
}

/** The turn of the drawing of one polymer. */
export function useDrawingTurn(polymerId: string): DrawingTurn {
  const stored = useLocalStorage(`beadwright.drawing.${polymerId}`, LEVEL)
  const view = computed(() => turnSchema.safeParse(stored.value).data ?? LEVEL)
  return {
    turn: computed(() => {
      const angle = (view.value.degrees * Math.PI) / 180
      const [cos, sin] = [Math.cos(angle), Math.sin(angle)]
      const side = view.value.mirrored ? -1 : 1
      return { a: side * cos, b: side * sin, c: -sin, d: cos, e: 0, f: 0 }
    }),
    turned: computed(() => view.value.degrees !== 0 || view.value.mirrored),
    rotate: () => {
      stored.value = { ...view.value, degrees: (view.value.degrees + TURN_STEP) % 360 }
    },
    // Left and right change places on the screen, whichever way the drawing is turned.
    mirror: () => {
      stored.value = { degrees: (360 - view.value.degrees) % 360, mirrored: !view.value.mirrored }
    },
    level: () => {
      stored.value = LEVEL
    },
  }
}
