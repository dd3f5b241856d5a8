import { computed, ref, watch } from 'vue'
import { LEAST_BASIN_DEPTH } from '@shared/basins'
import type { StatePoint } from '@shared/contracts/polymer'
import type { Term } from '@shared/contracts/mapping'
import { InvalidInputError } from '@shared/errors'
import type { Histogram } from '@shared/histogram'
import type { InversionSettings } from '@shared/inversion'
import { ApiError } from '@/api/http'
import type { InversionTask } from '@/workers'
import { useBenchReading } from './useBenchReading'
import { useBenchTerm, type BenchPlace } from './useBenchTerm'
import { useDelayed } from './useDelayed'
import { useFormRanking } from './useFormRanking'
import { useGroupDefaults } from './useGroupDefaults'
import { useInversion } from './useInversion'
import { useInversionDrafts } from './useInversionDrafts'
import { useSavePotential } from './useSavePotential'

/** How long nothing is shown while something loads. */
const QUIET_MILLISECONDS = 300

/**
 * One term at one state point on the bench: what is stored, the settings being tried, the inversion that follows from
 * them, the reading, and saving.
 *
 * @param onSaved after the potential or the number of samples was stored
 */
export function useBench(term: () => Term | null, statePoint: () => StatePoint | null, onSaved: () => void) {
  const place = (): BenchPlace | null => {
    const [termId, statePointId] = [term()?.id, statePoint()?.id]
    return termId === undefined || statePointId === undefined ? null : { termId, statePointId }
  }
  const stored = useBenchTerm(place)
  const draft = useInversionDrafts(place, () => stored.potential.value?.settings ?? null)

  const histogram = computed<Histogram | null>(() => {
    const distribution = stored.distribution.value
    if (distribution === null) return null
    const { kind, content, blocks } = distribution
    const { independentSamples } = distribution.settings
    const edges = Float64Array.from(distribution.edges)
    return {
      kind,
      edges,
      weights: Float64Array.from(distribution.weights),
      content,
      independentSamples,
      blocks,
    }
  })
  /** A way of looking, not a setting: it changes no table. */
  const basinDepth = ref(LEAST_BASIN_DEPTH)
  const defaults = useGroupDefaults()
  const task = computed<InversionTask | null>(() => {
    const temperature = statePoint()?.temperature
    if (histogram.value === null || temperature === undefined) return null
    return {
      histogram: histogram.value,
      temperature,
      settings: draft.settings.value,
      basinDepth: basinDepth.value,
      flatBelow: defaults.value.thresholds.flatBelow,
    }
  })
  const { answer, automatic, error } = useInversion(() => task.value)
  const { ranking, error: rankingError } = useFormRanking(() => task.value)
  const reading = useBenchReading(
    () => histogram.value,
    () => answer.value,
  )

  const saving = useSavePotential((potential) => {
    stored.potential.value = potential
    draft.undo()
    onSaved()
  })
  watch(() => JSON.stringify(place()), saving.forget)
  const save = async (revision = stored.potential.value?.revision ?? null): Promise<void> => {
    const here = place()
    if (here !== null) await saving.save(here, draft.settings.value, revision)
  }
  const takeTheirs = (): void => {
    if (saving.conflict.value === null) return
    stored.potential.value = saving.conflict.value
    draft.undo()
    saving.forget()
  }

  const sampleError = ref('')
  const stateSamples = async (samples: number | null): Promise<void> => {
    sampleError.value = ''
    try {
      await stored.stateSamples(samples)
      await stored.reload()
      onSaved()
    } catch (failure) {
      if (!(failure instanceof ApiError)) throw failure
      sampleError.value = failure.fieldMessage('independentSamples') ?? failure.message
    }
  }

  const waiting = computed(
    () => place() !== null && stored.loaded.value === null && stored.error.value === null,
  )
  const refusal = computed(() => {
    const failure = error.value
    return failure instanceof InvalidInputError
      ? { field: failure.place.field ?? '', message: failure.message }
      : null
  })
  const savable = computed(() => {
    const potential = stored.potential.value
    return (
      answer.value !== null &&
      error.value === null &&
      (draft.changed.value || potential === null || potential.stale)
    )
  })

  return {
    ...stored,
    ...draft,
    ...reading,
    histogram,
    answer,
    automatic,
    ranking,
    rankingError,
    basinDepth,
    inversionError: error,
    refusal,
    waiting,
    waitedLong: useDelayed(() => waiting.value, QUIET_MILLISECONDS),
    saving,
    savable,
    save,
    takeTheirs,
    sampleError,
    stateSamples,
    changeSettings: (change: Partial<InversionSettings>) =>
      draft.change({ ...draft.settings.value, ...change }),
  }
}
