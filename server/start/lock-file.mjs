import { randomBytes } from 'node:crypto'
import { linkSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { dirname } from 'node:path'
import { isRunning, thisProcess } from './process-identity.mjs'
import { waitUntil } from './wait-until.mjs'

/**
 * Takes the lock at `path` for this process if it is free or its holder is gone.
 *
 * @returns {{ holder: null, release: () => void } | { holder: { pid: number, started: string } }}
 */
export function takeLock(path) {
  mkdirSync(dirname(path), { recursive: true })
  for (;;) {
    if (createOwned(path)) return { holder: null, release: () => rmSync(path, { force: true }) }
    const holder = readOwner(path)
    if (isRunning(holder)) return { holder }
    if (!removeStale(path)) return { holder: readOwner(`${path}.takeover`) ?? holder }
  }
}

/** Runs `work` while this process holds the lock at `path`; waits for its holder, telling `onWait` once. */
export async function withLock(path, work, onWait = () => {}) {
  let told = false
  const lock = await waitUntil(
    () => {
      const taken = takeLock(path)
      if (taken.holder === null) return taken
      if (!told) onWait(taken.holder)
      told = true
      return null
    },
    { interval: 100 },
  )
  try {
    return await work()
  } finally {
    lock.release()
  }
}

/** Who holds the lock at `path`: null when nobody does or the file cannot be read. */
export function readOwner(path) {
  try {
    return JSON.parse(readFileSync(path, 'utf8'))
  } catch {
    return null
  }
}

/** A link appears in one step and with its content, so nobody ever reads a half-written lock. */
function createOwned(path) {
  const own = `${path}.${process.pid}.${randomBytes(4).toString('hex')}`
  writeFileSync(own, JSON.stringify(thisProcess()), { flag: 'wx', mode: 0o644 })
  try {
    linkSync(own, path)
    return true
  } catch (error) {
    if (error.code === 'EEXIST') return false
    throw error
  } finally {
    rmSync(own)
  }
}

/**
 * Removes a lock whose holder is gone. Two processes that find it at once must not both do so, for the later one would
 * remove the other's fresh lock: whoever makes the second file first looks again and removes. Returns false when another
 * process is at it.
 */
function removeStale(path) {
  const takeover = `${path}.takeover`
  if (!createOwned(takeover)) {
    if (isRunning(readOwner(takeover))) return false
    rmSync(takeover, { force: true })
    return true
  }
  if (!isRunning(readOwner(path))) rmSync(path, { force: true })
  rmSync(takeover, { force: true })
  return true
}
