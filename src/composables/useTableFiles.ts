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
import type { Pair } from '@shared/contracts/distribution'
import type { Term } from '@shared/contracts/mapping'
import type { TableQuery } from '@shared/contracts/potential'
import { ApiError } from '@/api/http'
import { listPairs } from '@/api/joint-distributions'
import { readTable } from '@/api/tables'
import { useWorkbenchStore } from '@/stores/workbench'

/** A table as its file has it: the numbers on the screen are read from the very text that is downloaded. */
export interface TableFile {
  readonly name: string
  readonly text: string
  readonly rows: number
  readonly low: number
  readonly high: number
  /** Coordinate of the row with the least energy. */
  readonly lowestAt: number
}

/** Reads off a table's text what its list shows. */
export const tableFileOf = (name: string, text: string): TableFile => {
  const rows = text
    .split('\n')
    .filter((line) => line.trim() !== '' && !line.startsWith('#'))
    .map((line) => line.trim().split(/\s+/).map(Number))
    .filter((row) => row.every((value) => Number.isFinite(value)))
  const lowest = rows.reduce((best, row) => (row[1] < best[1] ? row : best), rows[0])
  return {
    name,
    text,
    rows: rows.length,
    low: rows[0]?.[0] ?? Number.NaN,
    high: rows[rows.length - 1]?.[0] ?? Number.NaN,
    lowestAt: lowest?.[0] ?? Number.NaN,
  }
}

/** The tables of the mapping on screen at its state point, in the units asked for. */
export function useTableFiles(query: () => TableQuery | null): {
  files: ShallowRef<ReadonlyMap<string, TableFile>>
  failures: ShallowRef<ReadonlyMap<string, string>>
  loading: Ref<boolean>
  ready: ComputedRef<readonly Term[]>
  missing: ComputedRef<readonly Term[]>
  joint: ComputedRef<readonly Pair[]>
} {
  const workbench = useWorkbenchStore()
  const files = shallowRef<ReadonlyMap<string, TableFile>>(new Map())
  const failures = shallowRef<ReadonlyMap<string, string>>(new Map())
  const pairs = shallowRef<readonly Pair[]>([])
  const loading = ref(false)
  let leaving = new AbortController()
  onScopeDispose(() => leaving.abort())

  const ready = computed(() => workbench.terms.filter(({ standing }) => standing === 'inverted'))
  const missing = computed(() =>
    workbench.terms.filter(({ standing, current }) => current && standing !== 'inverted'),
  )
  const joint = computed(() => pairs.value.filter(({ decision }) => decision === 'joint'))

  const load = async (asked: TableQuery): Promise<void> => {
    leaving.abort()
    leaving = new AbortController()
    const { signal } = leaving
    loading.value = true
    const found = new Map<string, TableFile>()
    const failed = new Map<string, string>()
    await Promise.all(
      ready.value.map(async ({ id }) => {
        try {
          const { name, text } = await readTable(id, asked, signal)
          found.set(id, tableFileOf(name, text))
        } catch (error) {
          if (error instanceof ApiError) failed.set(id, error.message)
          else if (!signal.aborted) throw error
        }
      }),
    )
    if (signal.aborted) return
    files.value = found
    failures.value = failed
    loading.value = false
  }

  watch(
    [() => JSON.stringify(query()), ready],
    () => {
      const asked = query()
      if (asked !== null) void load(asked)
    },
    { immediate: true },
  )
  watch(
    [() => workbench.mapping?.id, () => workbench.statePoint?.id],
    async ([mappingId, statePointId]) => {
      pairs.value = mappingId && statePointId ? await listPairs(mappingId, statePointId) : []
    },
    { immediate: true },
  )

  return { files, failures, loading, ready, missing, joint }
}
