import { InvalidInputError } from '../../shared/errors'
import { UsageError } from './usage-error'

/**
 * Runs what works on a file; whatever is wrong with it is thrown again with the file's name in front.
 *
 * @throws {UsageError}
 */
export function withFileName(path: string, work: () => void): void {
  try {
    work()
  } catch (error) {
    if (!(error instanceof InvalidInputError)) throw error
    throw new UsageError(`${path === '-' ? 'standard input' : path}: ${error.message} (${error.code})`, {
      cause: error,
    })
  }
}
