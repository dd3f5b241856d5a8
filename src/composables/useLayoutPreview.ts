import { computed, shallowRef, watch, type ComputedRef, type Ref } from 'vue'
import { refDebounced } from '@vueuse/core'
import type { LayoutDocument, LayoutExample, LayoutPreview } from '@shared/contracts/layout'
import { layoutDocumentSchema } from '@shared/contracts/layout'
import { ApiError } from '@/api/http'
import { listLayoutExamples, previewLayout } from '@/api/layouts'
import { useLatest } from './useLatest'

/** Milliseconds without a change after which the file is written anew. */
const PAUSE = 250

/** What stops a preview, and the field and line it is about. */
export interface LayoutFault {
  readonly message: string
  readonly field: string | null
}

/** Tables of the group to try layouts on, and the one that is tried now. */
export function useLayoutExamples(groupId: () => string): {
  examples: Readonly<Ref<readonly LayoutExample[]>>
  chosen: Ref<string | null>
  example: ComputedRef<LayoutExample | null>
  loaded: Readonly<Ref<boolean>>
} {
  const examples = shallowRef<readonly LayoutExample[]>([])
  const chosen = shallowRef<string | null>(null)
  const loaded = shallowRef(false)
  watch(
    groupId,
    async (id) => {
      examples.value = await listLayoutExamples(id)
      chosen.value = examples.value[0] ? exampleKey(examples.value[0]) : null
      loaded.value = true
    },
    { immediate: true },
  )
  const example = computed(() => examples.value.find((each) => exampleKey(each) === chosen.value) ?? null)
  return { examples, chosen, example, loaded }
}

/** Names an example in a list of choices. */
export const exampleKey = ({ termId, statePointId }: LayoutExample): string => `${termId} ${statePointId}`

/** The file a layout makes of a table, written by the server while the layout changes. */
export function useLayoutPreview(
  layout: () => LayoutDocument | null,
  example: () => LayoutExample | null,
): {
  preview: Readonly<Ref<LayoutPreview | null>>
  /** null when the shown preview is that of the layout as it stands. */
  fault: ComputedRef<LayoutFault | null>
  busy: Readonly<Ref<boolean>>
} {
  const text = computed(() => JSON.stringify(layout()))
  const settled = refDebounced(text, PAUSE)
  const parsed = computed(() => layoutDocumentSchema.safeParse(JSON.parse(settled.value ?? 'null')))
  const question = computed(() => {
    const table = example()
    return parsed.value.success && table ? { document: parsed.value.data, table } : null
  })
  const { answer, error, busy } = useLatest(
    () => question.value,
    ({ document, table: { termId, statePointId } }) => previewLayout(termId, { statePointId, document }),
  )
  const fault = computed<LayoutFault | null>(() => {
    const issue = layout() === null ? undefined : parsed.value.error?.issues[0]
    if (issue) return { message: issue.message, field: issue.path.join('.') }
    if (!error.value) return null
    const field = error.value instanceof ApiError ? (error.value.body.field ?? null) : null
    return { message: error.value.message, field }
  })
  return { preview: answer, fault, busy }
}
