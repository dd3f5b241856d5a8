import { createHash } from 'node:crypto'
import { readFileSync, statSync } from 'node:fs'
import { basename } from 'node:path'
import { InvalidInputError } from '../../shared/errors'
import { MAX_FILE_BYTES } from '../../shared/intake'
import { UsageError } from './usage-error'

/** The text of a file with what identifies it. */
export interface Input {
  readonly name: string
  readonly sha256: string
  readonly text: string
}

/**
 * Reads a file, or standard input for '-'.
 *
 * @throws {UsageError} when the file cannot be read
 * @throws {InvalidInputError} FILE_TOO_LARGE
 */
export function readInput(path: string): Input {
  const bytes = path === '-' ? readFileSync(0) : readBytes(path)
  if (bytes.length > MAX_FILE_BYTES) {
    throw new InvalidInputError(
      'FILE_TOO_LARGE',
      `The file has ${(bytes.length / 1024 / 1024).toFixed(1)} MB; at most ${MAX_FILE_BYTES / 1024 / 1024} MB are read.`,
    )
  }
  return {
    name: path === '-' ? 'standard input' : basename(path),
    sha256: createHash('sha256').update(bytes).digest('hex'),
    text: bytes.toString('utf8'),
  }
}

function readBytes(path: string): Buffer {
  const found = statSync(path, { throwIfNoEntry: false })
  if (found === undefined) throw new UsageError(`${path}: there is no such file.`)
  if (found.isDirectory()) throw new UsageError(`${path}: this is a folder, not a file.`)
  try {
    return readFileSync(path)
  } catch (error) {
    throw new UsageError(`${path}: the file cannot be read.`, { cause: error })
  }
}
