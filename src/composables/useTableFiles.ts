import { computed, onScopeDispose, shallowRef, watch, type ComputedRef, type Ref, type ShallowRef } from 'vue'
import type { Pair } from '@shared/contracts/distribution'
import type { Term } from '@shared/contracts/mapping'
import type { TableQuery } from '@shared/contracts/potential'
import type { CoordinateUnit } from '@shared/units'
import { ApiError } from '@/api/http'
import { readTable } from '@/api/tables'
import { useWorkbenchStore } from '@/stores/workbench'
import { usePairs } from './usePairs'

/** A state point, the units of the files, and their layout. */
export type TableUnitQuery = Required<Pick<TableQuery, 'statePoint' | 'length' | 'angle' | 'energy'>> &
  Pick<TableQuery, 'layout' | 'layoutVersion'>

/**
 * A table and its file. The numbers on the screen are those of the plain table in the units one reads in; the text is the very
 * one that is downloaded, in whichever layout.
 */
export interface TableFile {
  readonly name: string
  readonly text: string
  /** Unit of its coordinate. */
  readonly unit: CoordinateUnit
  readonly rows: number
  readonly low: number
  readonly high: number
  /** Coordinate of the row with the least energy. */
  readonly lowestAt: number
}

/** Reads off a table's text what its list shows. */
export const tableFileOf = (name: string, text: string, unit: CoordinateUnit): TableFile => {
  const rows = text
    .split('\n')
    .filter((line) => line.trim() !== '' && !line.startsWith('#'))
    .map((line) => line.trim().split(/\s+/).map(Number))
    .filter((row) => row.every((value) => Number.isFinite(value)))
  const lowest = rows.reduce((best, row) => (row[1] < best[1] ? row : best), rows[0])
  return {
    name,
    text,
    unit,
    rows: rows.length,
    low: rows[0]?.[0] ?? Number.NaN,
    high: rows[rows.length - 1]?.[0] ?? Number.NaN,
    lowestAt: lowest?.[0] ?? Number.NaN,
  }
}

/** The tables of the mapping on screen at its state point, in the units asked for. */
export function useTableFiles(query: () => TableUnitQuery | null): {
  files: ShallowRef<ReadonlyMap<string, TableFile>>
  failures: ShallowRef<ReadonlyMap<string, string>>
  ready: ComputedRef<readonly Term[]>
  missing: ComputedRef<readonly Term[]>
  joint: ComputedRef<readonly Pair[]>
  pairsFailure: Ref<string>
} {
  const workbench = useWorkbenchStore()
  const files = shallowRef<ReadonlyMap<string, TableFile>>(new Map())
  const failures = shallowRef<ReadonlyMap<string, string>>(new Map())
  const { pairs, failure: pairsFailure } = usePairs()
  let leaving = new AbortController()
  onScopeDispose(() => leaving.abort())

  const ready = computed(() => workbench.usedTerms.filter(({ standing }) => standing === 'inverted'))
  const missing = computed(() =>
    workbench.usedTerms.filter(({ standing, current }) => current && standing !== 'inverted'),
  )
  const joint = computed(() => pairs.value.filter(({ decision, unfit }) => decision === 'joint' && !unfit))

  const load = async (asked: TableUnitQuery): Promise<void> => {
    leaving.abort()
    leaving = new AbortController()
    const { signal } = leaving
    const found = new Map<string, TableFile>()
    const failed = new Map<string, string>()
    await Promise.all(
      ready.value.map(async ({ id, kind }) => {
        try {
          const { layout, layoutVersion, ...plain } = asked
          const { name, text } = await readTable(id, plain, signal)
          const facts = tableFileOf(name, text, kind === 'bond' ? asked.length : asked.angle)
          const file =
            layout === undefined ? {} : await readTable(id, { ...plain, layout, layoutVersion }, signal)
          found.set(id, { ...facts, ...file })
        } catch (error) {
          if (error instanceof ApiError) failed.set(id, error.message)
          else if (!signal.aborted) throw error
        }
      }),
    )
    if (signal.aborted) return
    files.value = found
    failures.value = failed
  }

  watch(
    [() => JSON.stringify(query()), ready],
    () => {
      const asked = query()
      if (asked !== null) void load(asked)
    },
    { immediate: true },
  )
  return { files, failures, ready, missing, joint, pairsFailure }
}
