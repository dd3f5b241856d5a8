import type { z } from 'zod'
import { filePath } from './mapping-file-error'

/** What is wrong with one field of a file. */
export interface FieldError {
  readonly code: 'FIELD_MISSING' | 'FIELD_UNKNOWN' | 'FIELD_INVALID'
  readonly message: string
  /** Where in the file, such as `beads[2].name`. */
  readonly path: string
}

/** What an issue with the form of a file says to people: a field that is missing, unknown, or cannot be used. */
export function issueErrors(issue: z.core.$ZodIssue, value: unknown): FieldError[] {
  const path = filePath(issue.path)
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => ({
      code: 'FIELD_UNKNOWN',
      message: `The format has no field “${key}” there.`,
      path: filePath([...issue.path, key]),
    }))
  }
  if (valueAt(value, issue.path) === undefined) {
    return [{ code: 'FIELD_MISSING', message: `“${path}” is missing.`, path }]
  }
  return [{ code: 'FIELD_INVALID', message: `“${path}” cannot be used: ${issue.message}`, path }]
}

function valueAt(value: unknown, keys: readonly PropertyKey[]): unknown {
  return keys.reduce<unknown>(
    (inner, key) =>
      typeof inner === 'object' && inner !== null ? (inner as Record<PropertyKey, unknown>)[key] : undefined,
    value,
  )
}
