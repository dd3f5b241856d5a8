import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { run } from '../../server/cli/main'

/** What a run of the command wrote, and how it ended. */
export interface CommandResult {
  readonly status: number
  readonly printed: string
  readonly notes: string
}

/** Runs the beadwright command in this process. */
export async function runCommand(...words: string[]): Promise<CommandResult> {
  let printed = ''
  let notes = ''
  const status = await run(words, {
    print: (text) => void (printed += text),
    note: (text) => void (notes += `${text}\n`),
  })
  return { status, printed, notes }
}

/** Writes a text to a file of its own for the time of `work`, which gets its path. */
export async function withTextFile<Result>(
  text: string,
  work: (path: string) => Result | Promise<Result>,
): Promise<Result> {
  const folder = mkdtempSync(join(tmpdir(), 'beadwright-'))
  try {
    const path = join(folder, 'input.txt')
    writeFileSync(path, text)
    return await work(path)
  } finally {
    rmSync(folder, { recursive: true })
  }
}
