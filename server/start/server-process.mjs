import { spawn } from 'node:child_process'
import { closeSync, writeSync } from 'node:fs'
import { join } from 'node:path'
import { createInterface } from 'node:readline'
import { openLog } from './log-file.mjs'
import { isRunning, processStart } from './process-identity.mjs'
import { lastLines } from './run-program.mjs'
import { StartError } from './start-error.mjs'
import { waitUntil } from './wait-until.mjs'

const STOP_LIMIT = 15_000

/**
 * Starts the built server and waits until it accepts connections: it then writes a line `listening PORT`, and before it, when
 * the database knows no user, a line `set-up /PATH`. All other lines go to the log; these two do not, for the path is a secret.
 *
 * @param options.env its whole environment; `logFile`; `onSpawn(owner)` is told the process at once
 * @returns {Promise<{ port: number, setUpPath: string | null, owner: object, ended: Promise<string>, stop: () => Promise<void> }>}
 */
export async function startServer({ root, env, logFile, onSpawn = () => {} }) {
  const log = openLog(logFile)
  const child = spawn(process.execPath, ['--enable-source-maps', join(root, 'dist', 'server', 'index.js')], {
    cwd: root,
    env,
    stdio: ['ignore', 'pipe', log.descriptor],
    detached: true, // Ctrl-C reaches us alone, and we stop things in order
  })
  const owner = { pid: child.pid, started: processStart(child.pid) }
  onSpawn(owner)
  const ended = new Promise((resolve) => {
    child.once('error', (error) => resolve(error.message))
    child.once('close', (code, signal) => resolve(signal ? `signal ${signal}` : `exit code ${code}`))
  })
  const stop = () => stopProcess(owner)
  let setUpPath = null
  const listening = new Promise((resolve) => {
    const lines = createInterface({ input: child.stdout })
    lines.on('line', (line) => {
      const [, word, value] = /^(listening|set-up) (\S+)$/.exec(line) ?? []
      if (word === 'listening') resolve(Number(value))
      else if (word === 'set-up') setUpPath = value
      else writeSync(log.descriptor, `${line}\n`)
    })
  })
  void ended.then(() => closeSync(log.descriptor))
  const first = await Promise.race([listening, ended])
  if (typeof first === 'number') return { port: first, setUpPath, owner, ended, stop }
  throw new StartError(
    `The server ended before it was ready (${first}). Its log: ${logFile}`,
    lastLines(log.written()),
  )
}

/** Asks the process to end, and after a while makes it. */
export async function stopProcess(owner) {
  for (const signal of ['SIGTERM', 'SIGKILL']) {
    if (!isRunning(owner)) return
    process.kill(owner.pid, signal)
    if (await waitUntil(() => !isRunning(owner), { limit: STOP_LIMIT })) return
  }
}
