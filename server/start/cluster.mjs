import { existsSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { APPLICATION, createCluster, readPassword } from './cluster-creation.mjs'
import { withLock } from './lock-file.mjs'
import { startPostmaster } from './postmaster.mjs'
import { StartError } from './start-error.mjs'

/**
 * Opens the database cluster under `folder`: made if need be, started if need be, on a loopback port only.
 *
 * @param options.installed what findPostgres() found; `user` whom PostgreSQL runs as, null for ourselves; `logFile` where its
 *   log goes; `fast` for throw-away clusters that need not survive a power cut; `onSpawn(stop)` is called the moment
 *   PostgreSQL runs, before it is ready
 * @returns {Promise<{ url: string, superuserUrl: string, pid: number, isUp: () => boolean, close: () => Promise<void> }>}
 */
export async function openCluster({ folder, installed, user, logFile, fast = false, onSpawn = () => {} }) {
  const postmaster = await withLock(`${folder}.lock`, async () => {
    const programs = programsFor(join(folder, 'cluster'), installed)
    await createCluster({ folder, programs, user })
    return startPostmaster({ dataDirectory: join(folder, 'cluster'), programs, user, logFile, fast, onSpawn })
  })
  const url = (role, passwordFile, database) =>
    `postgresql://${role}:${readPassword(folder, passwordFile)}@127.0.0.1:${postmaster.port}/${database}`
  return {
    url: url(APPLICATION, 'password', APPLICATION),
    superuserUrl: url('postgres', 'superuser-password', 'postgres'),
    pid: postmaster.pid,
    isUp: postmaster.isUp,
    close: postmaster.stop,
  }
}

/** A cluster opens only with the major version it was made with; a new one takes the newest. */
function programsFor(cluster, installed) {
  if (!existsSync(cluster)) return installed[0].folder
  let major
  try {
    major = Number(readFileSync(join(cluster, 'PG_VERSION'), 'utf8'))
  } catch (error) {
    throw new StartError(
      error.code === 'EACCES'
        ? `The database in ${cluster} belongs to another user: start as the one who made it.`
        : `The folder ${cluster} holds no database: move it away and start again.`,
    )
  }
  const match = installed.find((programs) => programs.major === major)
  if (match) return match.folder
  throw new StartError(
    `The data in ${cluster} were made by PostgreSQL ${major}, which is not installed: install postgresql-${major}.`,
  )
}
