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

  onBeforeRouteLeave(() => saving.flush())
  onBeforeRouteUpdate((to, from) => to.params['mappingId'] === from.params['mappingId'] || saving.flush())
  useEventListener(window, 'beforeunload', (event: BeforeUnloadEvent) => {
    if (saving.unsaved.value) event.preventDefault()
  })
  return { saving, takeTheirs, keepMine }
}
