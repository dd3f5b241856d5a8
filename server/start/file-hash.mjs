import { createHash } from 'node:crypto'
import { readdirSync, readFileSync, statSync } from 'node:fs'
import { join } from 'node:path'

/**
 * One SHA-256 over the names and contents of all files at the given paths, folders with all that is in them; a path that
 * does not exist adds nothing.
 */
export function hashOfFiles(root, paths) {
  const hash = createHash('sha256')
  for (const file of paths.flatMap((path) => filesAt(root, path)).sort()) {
    const content = readFileSync(join(root, file))
    hash.update(`${file}\0${content.length}\0`).update(content)
  }
  return hash.digest('hex')
}

function filesAt(root, path) {
  const found = statSync(join(root, path), { throwIfNoEntry: false })
  if (!found) return []
  if (!found.isDirectory()) return [path]
  return readdirSync(join(root, path)).flatMap((name) => filesAt(root, `${path}/${name}`))
}
