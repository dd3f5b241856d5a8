import { z } from 'zod'
import { nameSchema } from '../contracts/common'
import { type LayoutDocument, layoutDocumentSchema } from '../contracts/layout'
import { InvalidInputError, type InvalidInputCode } from '../errors'
import { checkLayout } from '../layouts/check-layout'
import type { Layout } from '../layouts/layout'
import { type FieldError, issueErrors } from './file-issues'

export const LAYOUT_FILE_FORMAT = 'beadwright layout'
/** Version written; readers lift older ones, and refuse newer ones. */
export const LAYOUT_FILE_VERSION = 1

/** A layout as a file, version 1. Described in docs/layouts.md. */
const layoutFileSchema = z.strictObject({
  format: z.literal(LAYOUT_FILE_FORMAT),
  version: z.literal(LAYOUT_FILE_VERSION),
  name: nameSchema,
  layout: layoutDocumentSchema,
})

export type LayoutFileErrorCode =
  'FILE_NOT_JSON' | 'FILE_FORMAT_UNKNOWN' | 'FILE_VERSION_UNKNOWN' | FieldError['code'] | InvalidInputCode

/** Something wrong with a layout file. */
export interface LayoutFileError {
  readonly code: LayoutFileErrorCode
  readonly message: string
  /** Where in the file, such as `layout.columns[2]`; empty for the file as a whole. */
  readonly path: string
}

/** A layout file that could be read and used, or everything that is wrong with it. */
export type LayoutFileReading =
  | { readonly ok: true; readonly name: string; readonly layout: LayoutDocument }
  | { readonly ok: false; readonly errors: readonly LayoutFileError[] }

/** A layout as a file: JSON with two blanks of indentation and a line break at the end, the same text for the same layout. */
export function writeLayoutFile(layout: Layout, name: string): string {
  const file = { format: LAYOUT_FILE_FORMAT, version: LAYOUT_FILE_VERSION, name, layout }
  return `${JSON.stringify(file, null, 2)}\n`
}

/**
 * Reads a layout file. Fields that the format does not know are refused, since a misspelt one would be lost in silence.
 *
 * @param text JSON, with or without a byte order mark
 */
export function readLayoutFile(text: string): LayoutFileReading {
  let value: unknown
  try {
    value = JSON.parse(text.replace(/^\uFEFF/, ''))
  } catch (error) {
    const why = error instanceof Error ? ` (${error.message})` : ''
    return refused('FILE_NOT_JSON', `The file is not JSON${why}.`, '')
  }
  const { format, version } = (typeof value === 'object' && value !== null ? value : {}) as {
    format?: unknown
    version?: unknown
  }
  if (format !== LAYOUT_FILE_FORMAT) {
    return refused('FILE_FORMAT_UNKNOWN', `A layout file says "format": "${LAYOUT_FILE_FORMAT}".`, 'format')
  }
  if (version !== LAYOUT_FILE_VERSION) {
    return refused(
      'FILE_VERSION_UNKNOWN',
      `The file is of version ${JSON.stringify(version) ?? 'unknown'}; version ${LAYOUT_FILE_VERSION} can be read.`,
      'version',
    )
  }
  const parsed = layoutFileSchema.safeParse(value)
  if (!parsed.success) {
    return { ok: false, errors: parsed.error.issues.flatMap((issue) => issueErrors(issue, value)) }
  }
  const { name, layout } = parsed.data
  try {
    checkLayout(layout)
  } catch (error) {
    if (!(error instanceof InvalidInputError)) throw error
    return refused(error.code, error.message, `layout.${error.place.field ?? ''}`)
  }
  return { ok: true, name, layout }
}

function refused(code: LayoutFileErrorCode, message: string, path: string): LayoutFileReading {
  return { ok: false, errors: [{ code, message, path }] }
}
