import { ref, type Ref } from 'vue'
import { onBeforeRouteLeave, onBeforeRouteUpdate, useRouter } from 'vue-router'
import { useEventListener } from '@vueuse/core'
import type { Mapping } from '@shared/contracts/mapping'
import type { MappingDocument } from '@shared/mapping'
import { useWorkbenchStore } from '@/stores/workbench'
import type { History } from './useHistory'
import { type MappingSaving, useSaveMapping } from './useSaveMapping'

/** Saving on the board, and the two ways out when someone else saved in between. */
export interface BoardSaving {
  readonly saving: MappingSaving
  readonly takeTheirs: () => void
  /** Puts the mapping as it was last saved back on screen; what was painted stays one Undo away. */
  readonly takeBack: () => void
  /** How often someone wanted to leave while a new version waits to be saved. */
  readonly leaving: Ref<number>
  readonly keepMine: () => Promise<void>
}

/** Saves what is painted; leaving waits for the last save, and when that fails one stays and sees why. */
export function useBoardSaving(mapping: Mapping, history: History<MappingDocument>): BoardSaving {
  const router = useRouter()
  const workbench = useWorkbenchStore()
  const saving = useSaveMapping(mapping, history.value, (saved) => {
    workbench.replaceMapping(saved)
    void workbench.reloadTerms()
  })

  const takeTheirs = (): void => {
    const theirs = saving.takeTheirs()
    if (theirs) history.push(theirs)
  }
  const keepMine = async (): Promise<void> => {
    const names = new Set(workbench.mappings.map(({ name }) => name))
    const free = Array.from({ length: 100 }, (_, copy) => `${mapping.name}, version ${copy + 2}`)
    const mine = await saving.keepMine(free.find((name) => !names.has(name)) ?? free[0])
    if (mine) {
      await router.push({ name: 'mapping', params: { polymerId: mine.polymerId, mappingId: mine.id } })
    }
  }

  const takeBack = (): void => history.push(saving.stored.value.document)

  const leaving = ref(0)
  const leave = async (): Promise<boolean> => {
    const done = await saving.flush()
    if (!done && saving.held.value) leaving.value += 1
    return done
  }
  onBeforeRouteLeave(leave)
  onBeforeRouteUpdate((to, from) => to.params['mappingId'] === from.params['mappingId'] || leave())
  useEventListener(window, 'beforeunload', (event: BeforeUnloadEvent) => {
    if (saving.unsaved.value) event.preventDefault()
  })
  return { saving, takeTheirs, takeBack, keepMine, leaving }
}
