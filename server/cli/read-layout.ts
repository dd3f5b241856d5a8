import { readLayoutFile } from '../../shared/documents'
import type { Layout } from '../../shared/layouts'
import { readInput } from './read-input'
import { UsageError } from './usage-error'

/**
 * Reads a layout file.
 *
 * @throws {UsageError} with every error on a line of its own: the file, the place in it, what is wrong, the code
 */
export function readLayout(path: string): Layout {
  const { name, text } = readInput(path)
  const reading = readLayoutFile(text)
  if (reading.ok) return reading.layout
  const lines = reading.errors.map(
    (error) => `${name}: ${error.path === '' ? '' : `${error.path}: `}${error.message} (${error.code})`,
  )
  throw new UsageError(lines.join('\n'))
}
