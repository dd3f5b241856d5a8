import { computed, reactive, ref, shallowRef, toRaw, type ComputedRef, type Ref } from 'vue'
import type { LayoutDocument, StoredLayout } from '@shared/contracts/layout'
import { layoutCreateSchema, layoutDocumentSchema, layoutSchema } from '@shared/contracts/layout'
import { builtInLayout, DEFAULT_BUILT_IN } from '@shared/layouts/built-in-layouts'
import { ApiError } from '@/api/http'
import { createLayout, getLayout, saveLayout } from '@/api/layouts'
import { useDisplayUnits } from './useDisplayUnits'

/** A name and a document on the desk, with what they were when they came there. */
export interface LayoutEditor {
  draft: { name: string; document: LayoutDocument }
  stored: Readonly<Ref<StoredLayout | null>>
  dirty: ComputedRef<boolean>
  busy: Ref<boolean>
  failure: Readonly<Ref<string>>
  messages: Readonly<Ref<Readonly<Record<string, string>>>>
  /** Someone else saved in between: their version. */
  overtaken: Readonly<Ref<StoredLayout | null>>
  load: (layoutId: string, version?: number) => Promise<void>
  takeOver: (name: string, document: LayoutDocument) => void
  keepMine: () => void
  save: (groupId: string) => Promise<StoredLayout | null>
}

/** A layout while it is edited: loaded, changed, saved as the next version. */
export function useLayoutEditor(): LayoutEditor {
  const units = useDisplayUnits()
  const start = layoutDocumentSchema.parse(builtInLayout(DEFAULT_BUILT_IN, units))
  const draft = reactive({ name: '', document: start })
  const stored = shallowRef<StoredLayout | null>(null)
  const overtaken = shallowRef<StoredLayout | null>(null)
  const busy = ref(false)
  const failure = shallowRef('')
  const messages = shallowRef<Readonly<Record<string, string>>>({})
  const clean = shallowRef(JSON.stringify(draft))
  const dirty = computed(() => JSON.stringify(draft) !== clean.value)

  const show = (layout: StoredLayout): void => {
    stored.value = layout
    overtaken.value = null
    takeOver(layout.name, layout.document)
    clean.value = JSON.stringify(draft)
  }
  const takeOver = (name: string, document: LayoutDocument): void => {
    draft.name = name
    draft.document = structuredClone(toRaw(document))
  }
  const attempt = async <Result>(work: () => Promise<Result>): Promise<Result | null> => {
    busy.value = true
    failure.value = ''
    messages.value = {}
    try {
      return await work()
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      refuse(error)
      return null
    } finally {
      busy.value = false
    }
  }
  const refuse = ({ code, message, body }: ApiError): void => {
    failure.value = message
    if (body.field) messages.value = { [body.field]: message }
    const now = layoutSchema.safeParse(body.details)
    if (code === 'CONFLICT' && now.success) overtaken.value = now.data
  }
  const load = async (layoutId: string, version?: number): Promise<void> => {
    const layout = await attempt(() => getLayout(layoutId, version))
    if (layout) show(layout)
  }
  /** The next save goes over the version that came in between. */
  const keepMine = (): void => {
    if (overtaken.value) stored.value = overtaken.value
    overtaken.value = null
    failure.value = ''
  }
  const save = async (groupId: string): Promise<StoredLayout | null> => {
    const values = layoutCreateSchema.safeParse(JSON.parse(JSON.stringify(draft)))
    if (!values.success) {
      const issues = values.error.issues.map(({ path, message }) => [
        path.filter((part) => part !== 'document').join('.'),
        message,
      ])
      messages.value = Object.fromEntries(issues) as Record<string, string>
      failure.value = values.error.issues[0]?.message ?? ''
      return null
    }
    const base = stored.value
    const saved = await attempt(() =>
      base === null
        ? createLayout(groupId, values.data)
        : saveLayout(base.id, { ...values.data, version: base.newestVersion }),
    )
    if (saved) show(saved)
    return saved
  }

  return { draft, stored, dirty, busy, failure, messages, overtaken, load, takeOver, keepMine, save }
}
