import { computed, ref, shallowRef, watch, type ComputedRef, type Ref, type ShallowRef } from 'vue'
import { useDebounceFn } from '@vueuse/core'
import { mappingSchema, type Mapping } from '@shared/contracts/mapping'
import type { MappingDocument } from '@shared/mapping'
import { sameMakeUp } from '@shared/mapping/make-up'
import { ApiError } from '@/api/http'
import { createMapping, saveMapping } from '@/api/mappings'

/** Long enough for a stroke of painting to be one save. */
const PAUSE = 600

/** Saving a mapping while it is painted. */
export interface MappingSaving {
  readonly unsaved: ComputedRef<boolean>
  readonly saving: Ref<boolean>
  /** What someone else saved in between; nothing is saved until a person has chosen. */
  readonly conflict: ShallowRef<Mapping | null>
  readonly error: ShallowRef<ApiError | null>
  /** Since when changes could not be saved. */
  readonly failedAt: ShallowRef<Date | null>
  /**
   * Data stand on the mapping and the beads on screen are not those they were measured on: a save would make a new version. Nothing
   * is saved until a person says so.
   */
  readonly held: ComputedRef<boolean>
  /** The mapping as it was last saved. */
  readonly stored: ComputedRef<Mapping>
  /** Saves what is held as a new version. */
  readonly saveVersion: () => Promise<boolean>
  /** Saves now what is not saved. True when nothing is left to save. */
  readonly flush: () => Promise<boolean>
  /** Takes the other person's version as the one to go on from; returns its document. */
  readonly takeTheirs: () => MappingDocument | null
  /** Saves the document on screen as a new mapping beside theirs; null when it could not. */
  readonly keepMine: (name: string) => Promise<Mapping | null>
}

/**
 * Saves the document of a mapping whenever painting pauses, with the revision it started from. When someone else saved in
 * between nothing is overwritten: their version is put into `conflict`. What would make a new version waits for a person.
 *
 * @param opened the mapping as it was opened
 * @param document what is on screen
 */
export function useSaveMapping(
  opened: Mapping,
  document: Ref<MappingDocument>,
  onSaved: (mapping: Mapping) => void,
): MappingSaving {
  const saved = shallowRef<{ readonly document: MappingDocument; readonly mapping: Mapping }>({
    document: document.value,
    mapping: opened,
  })
  const saving = ref(false)
  const conflict = shallowRef<Mapping | null>(null)
  const error = shallowRef<ApiError | null>(null)
  const failedAt = shallowRef<Date | null>(null)
  const unsaved = computed(() => document.value !== saved.value.document)
  const stored = computed(() => saved.value.mapping)
  const held = computed(
    () => unsaved.value && stored.value.hasData && !sameMakeUp(stored.value.document, document.value),
  )
  let running: Promise<void> = Promise.resolve()

  const fail = (failure: unknown): void => {
    if (!(failure instanceof ApiError)) throw failure
    const theirs = mappingSchema.safeParse(failure.body.details)
    if (failure.code === 'CONFLICT' && theirs.success) {
      conflict.value = theirs.data
      return
    }
    error.value = failure
    failedAt.value ??= new Date()
  }

  const saveOnce = async (asVersion: boolean): Promise<void> => {
    if (!unsaved.value || conflict.value !== null || (held.value && !asVersion)) return
    const sent = document.value
    const { id, name, revision } = saved.value.mapping
    saving.value = true
    error.value = null
    try {
      const mapping = await saveMapping(id, { revision, name, document: sent })
      saved.value = { document: sent, mapping }
      failedAt.value = null
      onSaved(mapping)
    } catch (failure) {
      fail(failure)
    } finally {
      saving.value = false
    }
  }
  /** One save after the other: each goes out with the revision that the one before returned. */
  const inTurn = async (asVersion: boolean): Promise<boolean> => {
    running = running.then(() => saveOnce(asVersion))
    await running
    return !unsaved.value
  }
  const flush = (): Promise<boolean> => inTurn(false)
  const saveVersion = (): Promise<boolean> => inTurn(true)
  const saveSoon = useDebounceFn(() => void flush(), PAUSE)
  watch(unsaved, (waits) => waits && void saveSoon())
  watch(document, () => unsaved.value && void saveSoon())

  const takeTheirs = (): MappingDocument | null => {
    const theirs = conflict.value
    if (theirs === null) return null
    saved.value = { document: theirs.document, mapping: theirs }
    conflict.value = null
    error.value = null
    failedAt.value = null
    onSaved(theirs)
    return theirs.document
  }

  const keepMine = async (name: string): Promise<Mapping | null> => {
    saving.value = true
    try {
      const mine = await createMapping(opened.polymerId, { name, document: document.value })
      saved.value = { ...saved.value, document: document.value }
      conflict.value = null
      return mine
    } catch (failure) {
      fail(failure)
      return null
    } finally {
      saving.value = false
    }
  }

  return {
    unsaved,
    saving,
    conflict,
    error,
    failedAt,
    held,
    stored,
    flush,
    saveVersion,
    takeTheirs,
    keepMine,
  }
}
