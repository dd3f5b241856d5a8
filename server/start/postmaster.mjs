import { spawn } from 'node:child_process'
import { closeSync, readFileSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { postgresEnvironment } from './cluster-creation.mjs'
import { nextFreePort } from './free-port.mjs'
import { openLog } from './log-file.mjs'
import { isPostgresOf, postgresProcessesOf, readPostmasterFile } from './postmaster-file.mjs'
import { processStart } from './process-identity.mjs'
import { lastLines } from './run-program.mjs'
import { StartError } from './start-error.mjs'
import { waitUntil } from './wait-until.mjs'

const FIRST_PORT = 54330
/** Recovery after a power cut can take its time. */
const READY_LIMIT = 120_000
const FAST_SHUTDOWN_LIMIT = 20_000
const FAST_SETTINGS = ['fsync=off', 'synchronous_commit=off', 'full_page_writes=off', 'max_connections=300']

/**
 * The PostgreSQL server of a data directory: the one that already runs, or a new one on the next free port.
 *
 * @returns {Promise<{ pid: number, port: number, isUp: () => boolean, stop: () => Promise<void> }>}
 */
export async function startPostmaster(options) {
  const { dataDirectory } = options
  const running = readPostmasterFile(dataDirectory)
  if (running && isPostgresOf(dataDirectory, running.pid)) {
    options.onSpawn(() => stop(running.pid, upTest(running.pid)))
    return whenReady(options, running.pid)
  }
  await clearRemains(dataDirectory, running)
  for (let port = await nextFreePort(FIRST_PORT); ; port = await nextFreePort(port + 1)) {
    const postmaster = await tryPort(options, port)
    if (postmaster) return postmaster
  }
}

/**
 * After kill -9 of the postmaster its children leave by themselves within moments. PostgreSQL would refuse to start while
 * the number in its file belongs to anything, be it some other process or a dead one that nobody buried yet, so the file
 * goes.
 */
async function clearRemains(dataDirectory, left) {
  const gone = await waitUntil(() => postgresProcessesOf(dataDirectory).length === 0, { limit: 20_000 })
  if (!gone) {
    throw new StartError(
      `PostgreSQL processes ${postgresProcessesOf(dataDirectory).join(', ')} of an earlier start still use ` +
        `${dataDirectory}: end them and start again.`,
    )
  }
  if (left) rmSync(join(dataDirectory, 'postmaster.pid'), { force: true })
}

/** Null when somebody else took the port between our look and PostgreSQL's. */
async function tryPort(options, port) {
  const { dataDirectory, programs, user, logFile, fast, onSpawn } = options
  const log = openLog(logFile)
  const settings = [
    'listen_addresses=127.0.0.1',
    `port=${port}`,
    'unix_socket_directories=',
    ...(fast ? FAST_SETTINGS : []),
  ]
  const child = spawn(
    join(programs, 'postgres'),
    ['-D', dataDirectory, ...settings.flatMap((setting) => ['-c', setting])],
    {
      ...user,
      cwd: dataDirectory,
      env: postgresEnvironment(),
      stdio: ['ignore', log.descriptor, log.descriptor],
      detached: true, // Ctrl-C reaches us alone, and we stop things in order
    },
  )
  closeSync(log.descriptor)
  child.on('error', () => {}) // no pid then
  child.unref()
  onSpawn(() => stop(child.pid, upTest(child.pid)))
  try {
    return await whenReady(options, child.pid)
  } catch (error) {
    if (/could not bind/.test(log.written())) return null
    throw error
  }
}

async function whenReady({ dataDirectory, logFile }, pid) {
  const isUp = upTest(pid)
  const state = await waitUntil(
    () => {
      if (!isUp()) return { port: null }
      const file = readPostmasterFile(dataDirectory)
      return file?.pid === pid && file.ready ? file : null
    },
    { limit: READY_LIMIT },
  )
  if (!state?.port) {
    throw new StartError(
      `PostgreSQL did not start. Its log: ${logFile}`,
      lastLines(readFileSync(logFile, 'utf8')),
    )
  }
  return { pid, port: state.port, isUp, stop: () => stop(pid, isUp) }
}

/** A question whether this very process still runs. */
function upTest(pid) {
  const started = processStart(pid)
  return () => started !== null && processStart(pid) === started
}

/** Asks for a fast shutdown; should that take too long, for an immediate one, from which the next start recovers. */
async function stop(pid, isUp) {
  for (const signal of ['SIGINT', 'SIGQUIT']) {
    if (!isUp()) return
    process.kill(pid, signal)
    if (await waitUntil(() => !isUp(), { limit: FAST_SHUTDOWN_LIMIT })) return
  }
  throw new StartError(`PostgreSQL (process ${pid}) did not stop.`)
}
