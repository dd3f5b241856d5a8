import { computed, reactive, ref, shallowRef, watch, type ComputedRef, type Ref, type ShallowRef } from 'vue'
import { watchDebounced } from '@vueuse/core'
import type { Received } from '@shared/contracts/delivery'
import type { OwnLayout, Written, WritingQuery } from '@shared/contracts/delivery-writing'
import { builtInKeySchema, type LayoutDocument } from '@shared/contracts/layout'
import { BUILT_IN_LAYOUTS, DEFAULT_BUILT_IN, type LayoutUnits } from '@shared/layouts/built-in-layouts'
import type { Receiving } from '@/api/deliveries'
import { ApiError } from '@/api/http'
import { saveFile } from '@/components/figure/save-file'

/** The choice of the files as they were released. */
export const AS_RELEASED = 'released'

/** In which layout a recipient takes the tables. */
export interface Writing {
  /** 'released', the key of a layout of the house, the id of one of the group, or 'own'. */
  readonly chosen: Ref<string>
  readonly units: LayoutUnits & Record<keyof LayoutUnits, string>
  readonly own: ShallowRef<LayoutDocument | null>
  /** Units may be chosen: the layout is the house's. */
  readonly ownUnits: ComputedRef<boolean>
  /** What the layout makes of the tables; null for the files as released. */
  readonly written: ShallowRef<Written | null>
  /** Why it makes nothing of them. */
  readonly refusal: ShallowRef<ApiError | null>
  /** Address of the archive, of a file by its path in the release; null where a layout of one's own must be sent along. */
  readonly archiveUrl: ComputedRef<string | null>
  readonly fileUrl: ComputedRef<((path: string) => string) | null>
  readonly takeAll: () => Promise<void>
  readonly takeFile: (path: string) => Promise<void>
}

/** Keeps the choice of layout and units, and asks what comes of it. */
export function useWriting(api: () => Receiving, page: () => Received): Writing {
  const chosen = ref<string>(AS_RELEASED)
  const { length, angle, energy } = page().frozen.layout
  const units = reactive<LayoutUnits>({ length, angle, energy })
  const own = shallowRef<LayoutDocument | null>(null)
  const written = shallowRef<Written | null>(null)
  const refusal = shallowRef<ApiError | null>(null)

  /** Which layout of the house the release is written in; null for one of the group. */
  const releasedIn = computed(() => {
    const { layoutId } = page().frozen.layout
    return layoutId === null
      ? DEFAULT_BUILT_IN
      : (BUILT_IN_LAYOUTS.find(({ key }) => key === layoutId)?.key ?? null)
  })
  const isHouse = computed(() => builtInKeySchema.safeParse(chosen.value).success)
  const query = computed<WritingQuery>(() => {
    if (chosen.value === AS_RELEASED) return {}
    const layout = chosen.value
    return isHouse.value ? { layout, ...units } : { layout }
  })
  const mine = computed<OwnLayout | null>(() =>
    chosen.value === 'own' && own.value !== null ? { name: 'One of my own', document: own.value } : null,
  )

  let leaving = new AbortController()
  const ask = async (): Promise<void> => {
    leaving.abort()
    leaving = new AbortController()
    const { signal } = leaving
    refusal.value = null
    if (chosen.value === AS_RELEASED) {
      written.value = null
      return
    }
    try {
      const found = mine.value
        ? await api().ownWritten(mine.value, signal)
        : await api().written(query.value, signal)
      if (!signal.aborted) written.value = found
    } catch (error) {
      if (signal.aborted) return
      if (!(error instanceof ApiError)) throw error
      refusal.value = error
    }
  }
  watch([chosen, () => ({ ...units })], () => void ask())
  // As released there are the units of the release: others are another writing of the same layout.
  watch(
    () => ({ ...units }),
    (now) => {
      const others = now.length !== length || now.angle !== angle || now.energy !== energy
      if (others && chosen.value === AS_RELEASED && releasedIn.value !== null) chosen.value = releasedIn.value
    },
  )
  watch(chosen, (now) => {
    if (now === AS_RELEASED) Object.assign(units, { length, angle, energy })
  })
  watchDebounced(own, () => void ask(), { debounce: 400, deep: true })

  const taken = async (name: string, send: (layout: OwnLayout) => Promise<Blob>): Promise<void> => {
    if (mine.value === null) return
    try {
      saveFile(name, await send(mine.value))
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      refusal.value = error
    }
  }
  return {
    chosen,
    units,
    own,
    ownUnits: computed(() => isHouse.value || (chosen.value === AS_RELEASED && releasedIn.value !== null)),
    written,
    refusal,
    archiveUrl: computed(() => (mine.value ? null : api().archiveUrl(query.value))),
    fileUrl: computed(() => (mine.value ? null : (path: string) => api().fileUrl(path, query.value))),
    takeAll: () => taken(written.value?.archive.fileName ?? '', (layout) => api().ownArchive(layout)),
    takeFile: (path) => {
      const name = written.value?.tables.find((table) => table.path === path)?.written ?? path
      return taken(name, (layout) => api().ownFile(layout, path))
    },
  }
}
