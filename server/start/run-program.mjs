import { spawn } from 'node:child_process'
import { closeSync, mkdtempSync, openSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { StartError } from './start-error.mjs'

const running = new Set()

/**
 * Runs a program to its end with its output in a file.
 *
 * @param options uid, gid, cwd, env as for spawn; `input` is its standard input; `uninterrupted` keeps it going when we are
 *   stopped (a package manager must not be cut short)
 * @returns {Promise<{ code: number | null, output: string }>}
 */
export async function runProgram(command, args, options = {}) {
  const { input = '', uninterrupted = false, ...spawnOptions } = options
  const folder = mkdtempSync(join(tmpdir(), 'beadwright-'))
  const file = join(folder, 'output')
  const descriptor = openSync(file, 'a', 0o600)
  try {
    const child = spawn(command, args, {
      ...spawnOptions,
      detached: uninterrupted,
      stdio: ['pipe', descriptor, descriptor],
    })
    if (!uninterrupted) running.add(child)
    // A program that ends without reading its input breaks the pipe; its exit code tells the story.
    child.stdin.on('error', () => {})
    child.stdin.end(input)
    const code = await new Promise((resolve, reject) => {
      child.once('error', reject)
      child.once('close', resolve)
    }).finally(() => running.delete(child))
    return { code, output: readFileSync(file, 'utf8') }
  } finally {
    closeSync(descriptor)
    rmSync(folder, { recursive: true, force: true })
  }
}

/** As runProgram, and a failure becomes `message` with the end of the output below it. */
export async function runOrFail(message, command, args, options) {
  const { code, output } = await runProgram(command, args, options)
  if (code !== 0) throw new StartError(message, lastLines(output))
  return output
}

/** Stops what still runs, for a stop in the middle of the preparations. */
export function stopRunningPrograms() {
  for (const child of running) child.kill('SIGTERM')
}

/** The last 30 lines of a text. */
export function lastLines(text) {
  return text.trimEnd().split('\n').slice(-30).join('\n')
}
