import { existsSync, readFileSync } from 'node:fs'
import { dirname, join } from 'node:path'

/**
 * The folder of the package, the same for the built server and for its source.
 *
 * @param folder where the running file lies
 */
export function packageRoot(folder: string): string {
  if (existsSync(join(folder, 'package.json'))) return folder
  const parent = dirname(folder)
  if (parent === folder) throw new Error('The package.json of the server was not found.')
  return packageRoot(parent)
}

/** Its version, as package.json says. */
export function packageVersion(root: string): string {
  const { version } = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8')) as { version: string }
  return version
}
