import { spawnSync } from 'node:child_process'
import { readdirSync, realpathSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { findProgram, installSystemPackages, isExecutable } from './system-packages.mjs'

const DEBIAN_FOLDER = '/usr/lib/postgresql'

/**
 * The folders that hold initdb and postgres, Debian's newest first, then the one on PATH.
 *
 * @returns {{ folder: string, major: number }[]}
 */
export function findPostgres() {
  const onPath = findProgram('postgres')
  const folders = [...debianFolders(), ...(onPath ? [dirname(realpathSync(onPath))] : [])]
  return [...new Set(folders)]
    .filter((folder) => ['initdb', 'postgres'].every((name) => isExecutable(join(folder, name))))
    .map((folder) => ({ folder, major: majorVersion(folder) }))
}

/** As findPostgres, installing PostgreSQL first when there is none. */
export async function ensurePostgres() {
  if (findPostgres().length === 0) await installSystemPackages('PostgreSQL', ['postgresql'])
  return findPostgres()
}

function debianFolders() {
  try {
    return readdirSync(DEBIAN_FOLDER)
      .sort((one, other) => Number(other) - Number(one))
      .map((version) => join(DEBIAN_FOLDER, version, 'bin'))
  } catch {
    return []
  }
}

function majorVersion(folder) {
  const { stdout } = spawnSync(join(folder, 'postgres'), ['--version'], { encoding: 'utf8' })
  return Number(/(\d+)/.exec(stdout ?? '')?.[1])
}
