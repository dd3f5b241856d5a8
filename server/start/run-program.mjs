import { spawn } from 'node:child_process'
import { closeSync, fstatSync, mkdtempSync, openSync, readSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { StartError } from './start-error.mjs'

const running = new Set()

/**
 * Runs a program to its end with its output in a file (not a pipe: it may outlive us).
 *
 * @param options uid, gid, cwd, env as for spawn; `input` is its standard input; `uninterrupted` keeps it going when we are
 *   stopped (a package manager must not be cut short)
 * @returns {Promise<{ code: number | null, output: string }>}
 */
export async function runProgram(command, args, options = {}) {
  const { input = '', uninterrupted = false, ...spawnOptions } = options
  const descriptor = openNameless()
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
    return { code, output: readAll(descriptor) }
  } finally {
    closeSync(descriptor)
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

/** A file that has lost its name vanishes with the last process that holds it. */
function openNameless() {
  const folder = mkdtempSync(join(tmpdir(), 'beadwright-'))
  const descriptor = openSync(join(folder, 'output'), 'a+', 0o600)
  rmSync(folder, { recursive: true })
  return descriptor
}

function readAll(descriptor) {
  const content = Buffer.alloc(fstatSync(descriptor).size)
  readSync(descriptor, content, 0, content.length, 0)
  return content.toString()
}
