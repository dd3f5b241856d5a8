import { InvalidInputError } from '../../../shared/errors'
import { HttpError } from '../../errors/http-error'
import type { HandOverContent } from './content'
import { type WritingOptions, writeTableNamed } from './written-table'

/**
 * The file of one table as a release would write it now.
 *
 * @throws {HttpError} NOT_FOUND when there is no such table yet, or none can be made
 */
export function previewText(content: HandOverContent, options: WritingOptions, name: string): string {
  try {
    const written = writeTableNamed(content, options, name)
    if (written) return written.text
  } catch (error) {
    if (!(error instanceof InvalidInputError)) throw error
  }
  throw new HttpError('NOT_FOUND', 'There is no table of this name yet.', { field: 'table' })
}
