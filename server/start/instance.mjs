import { readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { takeLock } from './lock-file.mjs'
import { isRunning, thisProcess } from './process-identity.mjs'
import { StartError } from './start-error.mjs'
import { waitUntil } from './wait-until.mjs'

const HEALTH_LIMIT = 30_000

/**
 * Makes this process the one that runs Beadwright on the data folder, or finds the one that does. While another process is
 * still starting it waits for the outcome.
 *
 * @returns {Promise<{ url: string } | { announce, release, orphan }>} `url` of the one that runs; or ours to hold: `announce(facts)`
 *   tells others the url and the server's process, `orphan` is the server process that a killed predecessor left behind
 */
export async function takeInstance(dataFolder) {
  const lockFile = join(dataFolder, 'start.lock')
  const factsFile = join(dataFolder, 'running.json')
  let told = false
  for (;;) {
    const { holder, release } = takeLock(lockFile)
    if (holder === null) return ours(factsFile, release)
    if (!told && !announcedBy(holder, factsFile)) {
      console.log(`Beadwright is being started by process ${holder.pid}; waiting for it.`)
      told = true
    }
    await waitUntil(() => announcedBy(holder, factsFile) || !isRunning(holder), { interval: 200 })
    const facts = announcedBy(holder, factsFile)
    if (!facts || !isRunning(holder)) continue
    if (await waitUntil(() => isHealthy(facts.url), { limit: HEALTH_LIMIT, interval: 500 })) return facts
    if (isRunning(holder)) {
      throw new StartError(
        `Beadwright already runs as process ${holder.pid} but does not answer at ${facts.url}: end it and start again.`,
      )
    }
  }
}

/** Whether Beadwright answers at `url` and reaches its database. */
export async function isHealthy(url) {
  try {
    return (await fetch(`${url}/api/health`, { signal: AbortSignal.timeout(3000) })).ok
  } catch {
    return false
  }
}

function ours(factsFile, releaseLock) {
  const left = readFacts(factsFile)
  rmSync(factsFile, { force: true })
  return {
    orphan: left && isRunning(left.server) ? left.server : null,
    announce: (facts) => {
      writeFileSync(`${factsFile}.new`, JSON.stringify({ launcher: thisProcess(), ...facts }))
      renameSync(`${factsFile}.new`, factsFile)
    },
    release: () => {
      rmSync(factsFile, { force: true })
      releaseLock()
    },
  }
}

function announcedBy(holder, factsFile) {
  const facts = readFacts(factsFile)
  const same = facts?.launcher?.pid === holder.pid && facts.launcher.started === holder.started
  return same && facts.url ? facts : null
}

function readFacts(factsFile) {
  try {
    return JSON.parse(readFileSync(factsFile, 'utf8'))
  } catch {
    return null
  }
}
