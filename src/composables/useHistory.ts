import { computed, shallowRef, type ComputedRef } from 'vue'

const MOST_STEPS = 200

/** A value that can be taken back and done again. */
export interface History<Value> {
  readonly value: ComputedRef<Value>
  readonly canUndo: ComputedRef<boolean>
  readonly canRedo: ComputedRef<boolean>
  /** Makes this the value; the same value again is no step. */
  readonly push: (value: Value) => void
  readonly undo: () => void
  readonly redo: () => void
}

/** Keeps the last 200 steps of an immutable value. */
export function useHistory<Value>(first: Value): History<Value> {
  const steps = shallowRef<readonly Value[]>([first])
  const place = shallowRef(0)
  const value = computed(() => steps.value[place.value])
  const canUndo = computed(() => place.value > 0)
  const canRedo = computed(() => place.value < steps.value.length - 1)

  const push = (next: Value): void => {
    if (next === value.value) return
    steps.value = [...steps.value.slice(0, place.value + 1), next].slice(-MOST_STEPS)
    place.value = steps.value.length - 1
  }
  const undo = (): void => {
    if (canUndo.value) place.value -= 1
  }
  const redo = (): void => {
    if (canRedo.value) place.value += 1
  }
  return { value, canUndo, canRedo, push, undo, redo }
}
