import {
  computed,
  onScopeDispose,
  ref,
  shallowRef,
  watch,
  type ComputedRef,
  type Ref,
  type ShallowRef,
} from 'vue'
import type { HandOverDetail, HandOverRelease } from '@shared/contracts/hand-over-desk'
import type { Mapping } from '@shared/contracts/mapping'
import type { Polymer } from '@shared/contracts/polymer'
import { getHandOver, getRelease } from '@/api/hand-overs'
import { ApiError } from '@/api/http'
import { getMapping } from '@/api/mappings'
import { getPolymer } from '@/api/polymers'

/** A hand-over on screen, with the mapping that its beads are drawn from. */
export interface HandOverRoom {
  readonly detail: ShallowRef<HandOverDetail | null>
  /** What is frozen of a released one; null before. */
  readonly release: ShallowRef<HandOverRelease | null>
  readonly mapping: ShallowRef<Mapping | null>
  readonly polymer: ShallowRef<Polymer | null>
  readonly failure: ShallowRef<ApiError | null>
  readonly busy: Ref<boolean>
  /** Why the last step was refused. */
  readonly refusal: ShallowRef<ApiError | null>
  /** Parts of the checklist that are not met. */
  readonly open: ComputedRef<number>
  readonly load: () => Promise<void>
  /** Takes a step and shows what it led to; after a refusal what holds now is fetched, and the reason stays. */
  readonly take: (step: () => Promise<HandOverDetail | HandOverRelease>) => Promise<boolean>
}

/**
 * Loads a hand-over and takes steps on it.
 *
 * @param reads whether the person reads the work of a group at all; nothing is fetched for one who does not
 */
export function useHandOver(id: Ref<string>, reads: () => boolean = () => true): HandOverRoom {
  const detail = shallowRef<HandOverDetail | null>(null)
  const release = shallowRef<HandOverRelease | null>(null)
  const mapping = shallowRef<Mapping | null>(null)
  const polymer = shallowRef<Polymer | null>(null)
  const failure = shallowRef<ApiError | null>(null)
  const refusal = shallowRef<ApiError | null>(null)
  const busy = ref(false)
  let alive = true
  onScopeDispose(() => {
    alive = false
  })

  const fetchAll = async (): Promise<void> => {
    const wanted = id.value
    const found = await getHandOver(wanted)
    const [frozen, itsMapping, itsPolymer] = await Promise.all([
      found.number === null ? null : getRelease(wanted),
      getMapping(found.mappingId),
      getPolymer(found.polymerId),
    ])
    if (!alive || wanted !== id.value) return
    detail.value = found
    release.value = frozen
    mapping.value = itsMapping
    polymer.value = itsPolymer
  }
  const load = async (): Promise<void> => {
    failure.value = null
    try {
      await fetchAll()
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      failure.value = error
    }
  }
  const take: HandOverRoom['take'] = async (step) => {
    if (busy.value) return false
    busy.value = true
    refusal.value = null
    try {
      const led = await step()
      if ('checklist' in led) detail.value = led
      else await fetchAll()
      return true
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      refusal.value = error
      await load()
      return false
    } finally {
      busy.value = false
    }
  }

  watch(
    id,
    () => {
      if (reads()) void load()
    },
    { immediate: true },
  )
  const open = computed(() => detail.value?.checklist.filter(({ met }) => !met).length ?? 0)
  return { detail, release, mapping, polymer, failure, busy, refusal, open, load, take }
}
