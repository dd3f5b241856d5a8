import { writeFileSync } from 'node:fs'
import { UsageError } from './usage-error'

/** Where the command writes: results to standard output, notes and errors to standard error. */
export interface Output {
  readonly print: (text: string) => void
  readonly note: (text: string) => void
}

/** Standard output and standard error of this process. */
export const processOutput: Output = {
  print: (text) => void process.stdout.write(text),
  note: (text) => void process.stderr.write(`${text}\n`),
}

/**
 * Writes a text to a file, over one that was there, or to standard output for '-'.
 *
 * @throws {UsageError} when the file cannot be written
 */
export function writeText(path: string, text: string, output: Output): void {
  if (path === '-') return output.print(text)
  try {
    writeFileSync(path, text)
  } catch (error) {
    throw new UsageError(`${path}: the file cannot be written.`, { cause: error })
  }
}
