import { computed, shallowRef, type ComputedRef } from 'vue'

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

/** A step with the ones before and after it. */
interface Step<Value> {
  readonly value: Value
  readonly before: Step<Value> | null
  after: Step<Value> | null
}

/**
 * Keeps every step of an immutable value, from the first on. A step takes the room of what changed with it, as far as values
 * share what stayed, and no longer to make than the first.
 */
export function useHistory<Value>(first: Value): History<Value> {
  const step = shallowRef<Step<Value>>({ value: first, before: null, after: null })

  const push = (value: Value): void => {
    if (value === step.value.value) return
    const next: Step<Value> = { value, before: step.value, after: null }
    step.value.after = next
    step.value = next
  }
  const undo = (): void => {
    step.value = step.value.before ?? step.value
  }
  const redo = (): void => {
    step.value = step.value.after ?? step.value
  }
  return {
    value: computed(() => step.value.value),
    canUndo: computed(() => step.value.before !== null),
    canRedo: computed(() => step.value.after !== null),
    push,
    undo,
    redo,
  }
}
