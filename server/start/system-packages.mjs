import { accessSync, constants } from 'node:fs'
import { delimiter, join } from 'node:path'
import { lastLines, runProgram } from './run-program.mjs'
import { StartError } from './start-error.mjs'
import { step } from './step.mjs'
import { waitUntil } from './wait-until.mjs'

const LOCK_LIMIT_S = 300

/** Installs Debian packages with apt-get, or says in one line which to install when we may not or cannot. */
export async function installSystemPackages(name, packages) {
  const byHand = `apt-get install ${packages.join(' ')}`
  if (!findProgram('apt-get')) {
    throw new StartError(`${name} is missing: install it (on Debian: ${byHand}) and start again.`)
  }
  if (process.getuid() !== 0) {
    throw new StartError(`${name} is missing: run "sudo ${byHand}" and start again.`)
  }
  await step(`Installing ${name} from Debian's packages`, async () => {
    const update = await aptGet('update')
    const install = await aptGet('install', '-y', '--no-install-recommends', ...packages)
    if (install.code === 0) return
    const details = [update, install].filter(({ code }) => code !== 0).map(({ output }) => output)
    throw new StartError(`${name} could not be installed: try "${byHand}".`, lastLines(details.join('\n')))
  })
}

/** The full path of a program on PATH, or null. */
export function findProgram(name) {
  const places = (process.env.PATH ?? '').split(delimiter).filter(Boolean)
  return places.map((place) => join(place, name)).find(isExecutable) ?? null
}

/** Whether there is a file at `path` that we may run. */
export function isExecutable(path) {
  try {
    accessSync(path, constants.X_OK)
    return true
  } catch {
    return false
  }
}

/** apt-get waits for dpkg's lock by itself, but not for those of its lists and its archive. */
async function aptGet(...args) {
  const attempt = () =>
    runProgram('apt-get', ['-q', '-o', `DPkg::Lock::Timeout=${LOCK_LIMIT_S}`, ...args], {
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive', LC_ALL: 'C' },
      uninterrupted: true,
    })
  let result
  await waitUntil(
    async () => {
      result = await attempt()
      return result.code === 0 || !/Could not get lock|Unable to lock/.test(result.output)
    },
    { interval: 2000, limit: LOCK_LIMIT_S * 1000 },
  )
  return result
}
