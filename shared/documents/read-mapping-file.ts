import { issueErrors } from './file-issues'
import type { MappingFileError } from './mapping-file-error'
import {
  MAPPING_FILE_FORMAT,
  MAPPING_FILE_VERSION,
  type MappingFile,
  mappingFileSchema,
} from './mapping-file-schema'

/** A mapping file that could be read, or everything that is wrong with it. */
export type MappingFileReading =
  | { readonly ok: true; readonly file: MappingFile }
  | { readonly ok: false; readonly errors: readonly MappingFileError[] }

/**
 * Reads a mapping file as far as it can be judged by itself: its form, not yet its SMILES or atoms (see `importMappingFile`).
 * Fields that the format does not know are refused, since a misspelt one would be lost in silence.
 *
 * @param text JSON, with or without a byte order mark
 */
export function readMappingFile(text: string): MappingFileReading {
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
  if (format !== MAPPING_FILE_FORMAT) {
    return refused('FILE_FORMAT_UNKNOWN', `A mapping file says "format": "${MAPPING_FILE_FORMAT}".`, 'format')
  }
  if (version !== MAPPING_FILE_VERSION) {
    return refused(
      'FILE_VERSION_UNKNOWN',
      `The file is of version ${JSON.stringify(version) ?? 'unknown'}; version ${MAPPING_FILE_VERSION} can be read.`,
      'version',
    )
  }
  const parsed = mappingFileSchema.safeParse(value)
  if (parsed.success) return { ok: true, file: parsed.data }
  return { ok: false, errors: parsed.error.issues.flatMap((issue) => issueErrors(issue, value)) }
}

function refused(code: MappingFileError['code'], message: string, path: string): MappingFileReading {
  return { ok: false, errors: [{ code, message, path }] }
}
