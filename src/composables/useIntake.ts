import {
  computed,
  onScopeDispose,
  ref,
  shallowReactive,
  shallowRef,
  watch,
  type ComputedRef,
  type Ref,
} from 'vue'
import type { Pair } from '@shared/contracts/distribution'
import type { IntakeSettings, JointIntakeSettings } from '@shared/intake'
import { ApiError } from '@/api/http'
import { storeDistribution } from '@/api/distributions'
import { storeJointDistribution } from '@/api/joint-distributions'
import { guessStatePoint, guessTarget, targetKey, type IntakeTarget } from '@/components/intake/guess-target'
import { useWorkbenchStore } from '@/stores/workbench'
import {
  startIntakeWorker,
  type BlockFilesTask,
  type IntakeAnswer,
  type IntakeTask,
  type IntakeWorker,
} from '@/workers/intake'

/** Files of time blocks or chains that go with a file. */
export type IntakeBlockFiles = BlockFilesTask

/** A file that was brought and not yet stored. */
export interface IntakeItem {
  readonly id: number
  readonly file: File
  target: IntakeTarget | null
  /** The name of the file said what it is. */
  guessed: boolean
  /** A person said what it is. */
  aimed: boolean
  statePointId: string
  blocks: IntakeBlockFiles | null
  answer: IntakeAnswer | null
  /** Why the settings were guessed as they are; kept when one of them is changed by hand. */
  reasons: readonly string[]
  reading: boolean
  storing: boolean
  failure: string
}

/** The settings an item is read with. */
export const settingsOf = (item: IntakeItem): IntakeSettings | JointIntakeSettings | null =>
  item.answer?.single?.settings ?? item.answer?.joint?.settings ?? null

/** Whether an item could be stored as it stands. */
export const isReady = (item: IntakeItem): boolean =>
  item.target !== null &&
  !item.reading &&
  !item.storing &&
  (item.answer?.single?.histogram ?? item.answer?.joint?.histogram ?? null) !== null

export interface Intake {
  readonly items: readonly IntakeItem[]
  readonly current: ComputedRef<IntakeItem | null>
  readonly currentId: Ref<number | null>
  bring(files: Iterable<File>, asked: IntakeTarget | null): void
  drop(item: IntakeItem): void
  aim(item: IntakeItem, target: IntakeTarget): void
  read(item: IntakeItem, settings: IntakeSettings | JointIntakeSettings | null): Promise<void>
  /** Takes files of blocks or chains along, or none, and reads again. */
  takeBlocks(item: IntakeItem, blocks: IntakeBlockFiles | null): Promise<void>
  store(item: IntakeItem): Promise<boolean>
}

/**
 * The files on the intake desk: each is read in a worker as what its name says it is, read again when something is changed,
 * and stored only when asked. `asked` is the term or pair the person came from; it is taken when a file's name says nothing.
 */
export function useIntake(
  pairs: Ref<readonly Pair[]>,
  start: () => IntakeWorker = startIntakeWorker,
): Intake {
  const workbench = useWorkbenchStore()
  const items = shallowReactive<IntakeItem[]>([])
  const currentId = ref<number | null>(null)
  const worker = shallowRef<IntakeWorker | null>(null)
  let last = 0
  onScopeDispose(() => worker.value?.stop())

  const current = computed(() => items.find(({ id }) => id === currentId.value) ?? null)

  const taskFor = (
    item: IntakeItem,
    settings: IntakeSettings | JointIntakeSettings | null,
  ): IntakeTask | null => {
    const kindOf = (id: string) => workbench.terms.find((term) => term.id === id)?.kind
    if (item.target === null) return null
    if (item.target.type === 'term') {
      const kind = kindOf(item.target.termId)
      if (!kind) return null
      return { kinds: [kind], settings: settings as IntakeSettings | null, blocks: item.blocks }
    }
    const first = kindOf(item.target.firstTermId)
    const second = kindOf(item.target.secondTermId)
    return first && second
      ? { kinds: [first, second], settings: settings as JointIntakeSettings | null }
      : null
  }

  const read = async (
    item: IntakeItem,
    settings: IntakeSettings | JointIntakeSettings | null,
  ): Promise<void> => {
    const task = taskFor(item, settings)
    if (task === null) return
    item.reading = true
    item.failure = ''
    worker.value ??= start()
    try {
      const answer = await worker.value.readFile(item.id, item.file, task)
      item.answer = answer
      if (settings === null) item.reasons = (answer.single ?? answer.joint)?.reasons ?? []
    } catch (error) {
      item.failure = error instanceof Error ? error.message : String(error)
    } finally {
      item.reading = false
    }
  }

  const bring = (files: Iterable<File>, asked: IntakeTarget | null): void => {
    for (const file of files) {
      const named = guessTarget(file.name, workbench.terms, pairs.value)
      const item = shallowReactive<IntakeItem>({
        id: ++last,
        file,
        target: named ?? asked,
        guessed: named !== null,
        aimed: false,
        statePointId: guessStatePoint(file.name, workbench.statePoints)?.id ?? workbench.statePoint?.id ?? '',
        blocks: null,
        answer: null,
        reasons: [],
        reading: false,
        storing: false,
        failure: '',
      })
      items.push(item)
      if (current.value === null) currentId.value = item.id
      void read(item, null)
    }
  }

  const drop = (item: IntakeItem): void => {
    const place = items.indexOf(item)
    if (place < 0) return
    items.splice(place, 1)
    void worker.value?.forgetFile(item.id)
    if (currentId.value === item.id) currentId.value = items[Math.min(place, items.length - 1)]?.id ?? null
  }

  const takeBlocks = (item: IntakeItem, blocks: IntakeBlockFiles | null): Promise<void> => {
    item.blocks = blocks
    return read(item, settingsOf(item))
  }

  const turn = (item: IntakeItem, target: IntakeTarget): void => {
    const before = taskFor(item, null)?.kinds.join()
    item.target = target
    const sameKinds = before === taskFor(item, null)?.kinds.join()
    void read(item, sameKinds ? settingsOf(item) : null)
  }

  const aim = (item: IntakeItem, target: IntakeTarget): void => {
    item.aimed = true
    turn(item, target)
  }

  // Files may be brought before the pairs are known; a pair in the name was then taken for one of its terms.
  watch(pairs, () => {
    for (const item of items.filter(({ aimed }) => !aimed)) {
      const named = guessTarget(item.file.name, workbench.terms, pairs.value)
      if (named === null || (item.target !== null && targetKey(item.target) === targetKey(named))) continue
      item.guessed = true
      turn(item, named)
    }
  })

  const send = async (item: IntakeItem, target: IntakeTarget): Promise<void> => {
    const statePointId = item.statePointId
    if (target.type === 'term' && item.answer?.single?.settings) {
      const { blocks } = item
      const settings = item.answer.single.settings
      if (blocks === null) {
        await storeDistribution(target.termId, item.file, { statePointId, settings })
        return
      }
      const upload = { statePointId, settings, firstOf: blocks.isFirst ? blocks.kind : null }
      const parts = blocks.kind === 'time' ? { blocks: blocks.files } : { chains: blocks.files }
      await storeDistribution(target.termId, item.file, upload, parts)
    } else if (target.type === 'pair' && item.answer?.joint?.settings) {
      const { kinds, units, ...rest } = item.answer.joint.settings
      await storeJointDistribution(workbench.mapping?.id ?? '', item.file, {
        firstTermId: target.firstTermId,
        secondTermId: target.secondTermId,
        statePointId,
        settings: { ...rest, kinds: [kinds[0], kinds[1]], units: [units[0], units[1]] },
      })
    }
  }

  /** Stores a file as it is read now; true when it went through. */
  const store = async (item: IntakeItem): Promise<boolean> => {
    if (!isReady(item) || item.target === null) return false
    item.storing = true
    item.failure = ''
    try {
      await send(item, item.target)
      drop(item)
      return true
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      item.failure = error.message
      return false
    } finally {
      item.storing = false
    }
  }

  return { items, current, currentId, bring, drop, aim, read, takeBlocks, store }
}
