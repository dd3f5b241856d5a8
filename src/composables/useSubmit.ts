import { ref, shallowRef, type Ref, type ShallowRef } from 'vue'
import type { z } from 'zod'
import { ApiError } from '@/api/http'

type Messages = Readonly<Record<string, string>>

/** The first message for each field of a form that does not fit its contract. */
export const fieldMessages = (schema: z.ZodType, values: unknown): Messages => {
  const result = schema.safeParse(values)
  if (result.success) return {}
  const messages: Record<string, string> = {}
  for (const issue of result.error.issues) {
    const field = String(issue.path[0] ?? '')
    messages[field] ??= issue.message
  }
  return messages
}

/**
 * Sends a form: checks it by the contract, keeps it from being sent twice, and puts every message where it belongs, at its
 * field or, when it is about no field, above the button.
 *
 * @param schema the contract, or what fetches it when the form is first sent
 */
export function useSubmit<Values>(
  schema: z.ZodType | (() => Promise<z.ZodType>),
  fields: readonly string[],
): {
  busy: Ref<boolean>
  messages: ShallowRef<Messages>
  failure: ShallowRef<ApiError | null>
  check: (values: Values) => boolean
  submit: (values: Values, send: () => Promise<void>) => Promise<boolean>
} {
  const busy = ref(false)
  const messages = shallowRef<Messages>({})
  const failure = shallowRef<ApiError | null>(null)

  const fits = (contract: z.ZodType, values: Values): boolean => {
    messages.value = fieldMessages(contract, values)
    return Object.keys(messages.value).length === 0
  }
  const check = (values: Values): boolean => typeof schema === 'function' || fits(schema, values)

  const submit = async (values: Values, send: () => Promise<void>): Promise<boolean> => {
    failure.value = null
    if (busy.value) return false
    busy.value = true
    try {
      if (!fits(typeof schema === 'function' ? await schema() : schema, values)) return false
      await send()
      return true
    } catch (error) {
      if (!(error instanceof ApiError)) throw error
      const found = fields.flatMap((field) => {
        const message = error.fieldMessage(field)
        return message === undefined ? [] : [[field, message] as const]
      })
      messages.value = Object.fromEntries(found)
      if (found.length === 0) failure.value = error
      return false
    } finally {
      busy.value = false
    }
  }

  return { busy, messages, failure, check, submit }
}
