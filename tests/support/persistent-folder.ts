import { chmodSync, mkdtempSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'

/** A new data folder that the database's user can walk into; whoever asked for it removes it. */
export function persistentFolder(): string {
  const folder = mkdtempSync(join(tmpdir(), 'beadwright-data-'))
  chmodSync(folder, 0o755)
  return folder
}
