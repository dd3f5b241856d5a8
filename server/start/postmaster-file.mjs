import { readdirSync, readFileSync, readlinkSync, realpathSync } from 'node:fs'
import { join } from 'node:path'
import { processStart } from './process-identity.mjs'

/**
 * What PostgreSQL wrote about itself into postmaster.pid of the data directory.
 *
 * @returns {{ pid: number, port: number, ready: boolean } | null} null without such a file
 */
export function readPostmasterFile(dataDirectory) {
  let lines
  try {
    lines = readFileSync(join(dataDirectory, 'postmaster.pid'), 'utf8').split('\n')
  } catch {
    return null
  }
  // Lines: pid, data directory, start time, port, socket directory, address, shared memory, state.
  return { pid: Number(lines[0]), port: Number(lines[3]), ready: lines[7]?.trim() === 'ready' }
}

/**
 * Whether `pid` is a PostgreSQL process of this data directory, and not one that got the same number later. PostgreSQL works
 * inside its data directory, which Linux shows; elsewhere the number must do.
 */
export function isPostgresOf(dataDirectory, pid) {
  if (processStart(pid) === null) return false
  if (process.platform !== 'linux') return true
  try {
    return readlinkSync(`/proc/${pid}/cwd`) === realpathSync(dataDirectory)
  } catch {
    return false
  }
}

/** All PostgreSQL processes of this data directory, among them those that outlive a killed postmaster for a moment. */
export function postgresProcessesOf(dataDirectory) {
  if (process.platform !== 'linux') return []
  return readdirSync('/proc')
    .filter((name) => /^\d+$/.test(name))
    .map(Number)
    .filter((pid) => isPostgresOf(dataDirectory, pid))
}
