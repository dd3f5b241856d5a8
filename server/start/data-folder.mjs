import { createHash } from 'node:crypto'
import { existsSync, mkdirSync, realpathSync } from 'node:fs'
import { homedir, tmpdir } from 'node:os'
import { basename, dirname, join, resolve, sep } from 'node:path'
import { canEnter } from './database-user.mjs'
import { StartError } from './start-error.mjs'

/**
 * The folder that holds the database and the logs.
 *
 * A given one is taken as it is. Otherwise it is `.data` in the clone, unless that is a temporary folder or the database's
 * user cannot walk in; then a folder of the system, named after the clone so that two clones never share data. Data that
 * exist are never left behind for an empty folder when rights change.
 *
 * @param options.given DATA_DIR or null; `user` as databaseUser() gives it
 */
export function chooseDataFolder({ given, repository, user, environment = process.env }) {
  if (given) return given
  const inside = join(repository, '.data')
  const outside = join(
    user ? '/var/lib' : (environment.XDG_DATA_HOME ?? join(homedir(), '.local', 'share')),
    'beadwright',
    `${basename(repository)}-${createHash('sha256').update(repository).digest('hex').slice(0, 10)}`,
  )
  const used = [inside, outside].find((folder) => existsSync(join(folder, 'postgres', 'cluster')))
  if (used) return used
  return isTemporary(inside) || (user && !canEnter(inside, user)) ? outside : inside
}

/** Makes the folder and checks that the database's user can walk in. */
export function prepareDataFolder(folder, user) {
  mkdirSync(folder, { recursive: true, mode: 0o755 })
  if (user && !canEnter(folder, user)) {
    throw new StartError(
      `The user "postgres" cannot walk into ${folder}: give it the right to, or set DATA_DIR to another folder.`,
    )
  }
  return realpathSync(folder)
}

/** Whether the system may empty the folder: it lies under one of its temporary folders. */
export function isTemporary(folder) {
  const real = nearestReal(resolve(folder))
  return ['/tmp', '/var/tmp', '/dev/shm', '/run', tmpdir()].some((place) => {
    const realPlace = nearestReal(place)
    return real === realPlace || real.startsWith(realPlace + sep)
  })
}

function nearestReal(path) {
  if (existsSync(path)) return realpathSync(path)
  return join(nearestReal(dirname(path)), basename(path))
}
