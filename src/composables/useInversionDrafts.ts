import { computed, type ComputedRef } from 'vue'
import { useSessionStorage } from '@vueuse/core'
import { inversionSettingsSchema } from '@shared/contracts/potential'
import { DEFAULT_INVERSION_SETTINGS, type InversionSettings } from '@shared/inversion'
import type { BenchPlace } from './useBenchTerm'

/** The settings on screen and how they stand to the saved ones. */
export interface InversionDraft {
  readonly settings: ComputedRef<InversionSettings>
  /** Whether the settings differ from the saved ones, or from the defaults where none are saved. */
  readonly changed: ComputedRef<boolean>
  readonly change: (settings: InversionSettings) => void
  /** Back to the saved settings, or to the defaults where none are saved. */
  readonly undo: () => void
}

/**
 * Settings of the term on the bench as they are being tried. They are kept per term and state point for as long as the
 * browser's tab lives, so that a look at another term or room loses nothing.
 */
export function useInversionDrafts(
  place: () => BenchPlace | null,
  saved: () => InversionSettings | null,
): InversionDraft {
  const drafts = useSessionStorage<Record<string, unknown>>('beadwright.bench-drafts', {}, { shallow: true })
  const key = computed(() => {
    const here = place()
    return here === null ? null : `${here.termId} ${here.statePointId}`
  })
  const base = computed(() => saved() ?? DEFAULT_INVERSION_SETTINGS)
  const draft = computed<InversionSettings | null>(() => {
    const read = inversionSettingsSchema.safeParse(key.value === null ? null : drafts.value[key.value])
    return read.success ? read.data : null
  })
  const changed = computed(() => draft.value !== null && !sameSettings(draft.value, base.value))

  const put = (settings: InversionSettings | null): void => {
    if (key.value === null) return
    const rest = Object.entries(drafts.value).filter(([other]) => other !== key.value)
    drafts.value = Object.fromEntries(settings === null ? rest : [...rest, [key.value, settings]])
  }

  return {
    settings: computed(() => draft.value ?? base.value),
    changed,
    change: (settings) => put(sameSettings(settings, base.value) ? null : settings),
    undo: () => put(null),
  }
}

/** Whether two settings say the same. */
export function sameSettings(one: InversionSettings, other: InversionSettings): boolean {
  return asText(one) === asText(other)
}

const asText = ({ jacobian, smoothing, table, ...rest }: InversionSettings): string =>
  JSON.stringify([
    jacobian,
    smoothing.mode,
    smoothing.mode === 'auto' ? smoothing.criterion : null,
    smoothing.mode === 'manual' ? smoothing.log10Lambda : null,
    rest.inefficiency,
    rest.straightAngle,
    rest.tails.stiffness,
    rest.form,
    table.rows,
    table.low,
    table.high,
    table.cap,
  ])
