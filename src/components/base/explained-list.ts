import type { InjectionKey, ShallowRef } from 'vue'

/** Explained numbers that share one tab stop: the id of the one that has it. */
export const EXPLAINED_LIST: InjectionKey<{
  readonly current: ShallowRef<string | null>
  readonly enter: (id: string) => void
  readonly leave: (id: string) => void
}> = Symbol('explained list')
