import { randomBytes } from 'node:crypto'
import { chownSync, existsSync, mkdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { runOrFail } from './run-program.mjs'
import { StartError } from './start-error.mjs'

/** The role and the database of the application; the superuser is "postgres". */
export const APPLICATION = 'beadwright'

/**
 * Makes the database cluster in `folder` unless it is there: everything happens in a folder of another name that is renamed
 * at the very end, so `cluster` exists only when whole, and what a cut-short start left behind is thrown away.
 *
 * @param options.programs the folder of initdb and postgres; `user` whom they run as, null for ourselves
 */
export async function createCluster({ folder, programs, user }) {
  const cluster = join(folder, 'cluster')
  if (existsSync(cluster)) return
  makePrivateFolder(folder, user)
  const unfinished = join(folder, 'cluster.new')
  rmSync(unfinished, { recursive: true, force: true })
  const superuserFile = writePassword(folder, 'superuser-password', user)
  writePassword(folder, 'password', user)
  const options = { ...user, cwd: folder, env: postgresEnvironment() }
  await runOrFail(
    'The database could not be made.',
    join(programs, 'initdb'),
    [
      ...['-D', unfinished, '-U', 'postgres', `--pwfile=${superuserFile}`],
      ...['-A', 'scram-sha-256', '-E', 'UTF8', '--locale=C.UTF-8'],
    ],
    options,
  )
  await runInSingleUserMode({ programs, cluster: unfinished, options }, [
    `CREATE ROLE ${APPLICATION} LOGIN PASSWORD '${readPassword(folder, 'password')}'`,
    `CREATE DATABASE ${APPLICATION} OWNER ${APPLICATION}`,
  ])
  renameSync(unfinished, cluster)
}

/** The password kept under `name` beside the cluster. */
export function readPassword(folder, name) {
  return readFileSync(join(folder, name), 'utf8').trim()
}

/** Nothing of the caller's PG… variables reaches PostgreSQL; messages in English, since we look for two of them. */
export function postgresEnvironment() {
  return { PATH: process.env.PATH, LC_ALL: 'C.UTF-8', LANGUAGE: 'C' }
}

/** Needs neither a port nor a client program. Errors do not end this mode, so they are looked for. */
async function runInSingleUserMode({ programs, cluster, options }, statements) {
  const message = 'The database could not be set up.'
  const output = await runOrFail(
    message,
    join(programs, 'postgres'),
    ['--single', '-D', cluster, 'postgres'],
    { ...options, input: statements.map((statement) => `${statement};\n`).join('') },
  )
  if (/\b(ERROR|FATAL|PANIC):/.test(output)) throw new StartError(message)
}

function writePassword(folder, name, user) {
  const file = join(folder, name)
  rmSync(file, { force: true })
  writeFileSync(file, `${randomBytes(24).toString('base64url')}\n`, { mode: 0o600 })
  if (user) chownSync(file, user.uid, user.gid)
  return file
}

function makePrivateFolder(folder, user) {
  mkdirSync(folder, { recursive: true, mode: 0o700 })
  if (user) chownSync(folder, user.uid, user.gid)
}
