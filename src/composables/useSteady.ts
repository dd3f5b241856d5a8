import { computed, type ComputedRef } from 'vue'

/** A small value that keeps its identity as long as it says the same, so that what rests on it is not drawn again. */
export function useSteady<Value>(source: () => Value): ComputedRef<Value> {
  return computed<Value>((before) => {
    const next = source()
    return before !== undefined && JSON.stringify(before) === JSON.stringify(next) ? before : next
  })
}
