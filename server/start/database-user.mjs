import { spawnSync } from 'node:child_process'
import { existsSync, readFileSync } from 'node:fs'
import { dirname } from 'node:path'
import { StartError } from './start-error.mjs'

/**
 * As whom PostgreSQL runs. It refuses to run as root, so root hands it to the user that Debian's package made.
 *
 * @returns {{ uid: number, gid: number } | null} null: as ourselves
 */
export function databaseUser() {
  if (process.getuid() !== 0) return null
  const line = readFileSync('/etc/passwd', 'utf8')
    .split('\n')
    .find((entry) => entry.startsWith('postgres:'))
  if (!line) throw new StartError('PostgreSQL does not run as root and there is no user "postgres": add one.')
  const [, , uid, gid] = line.split(':').map(Number)
  return { uid, gid }
}

/** Whether that user can walk into `folder`, or into the nearest folder above it that exists. */
export function canEnter(folder, user) {
  if (!existsSync(folder)) return canEnter(dirname(folder), user)
  return spawnSync('test', ['-x', folder], { ...user, cwd: '/' }).status === 0
}
