import { chmodSync, mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { onTestFinished } from 'vitest'

/** A new folder that others can walk into; it goes when the test is over. */
export function temporaryFolder(): string {
  const folder = mkdtempSync(join(tmpdir(), 'beadwright-test-'))
  chmodSync(folder, 0o755)
  onTestFinished(() => rmSync(folder, { recursive: true, force: true }))
  return folder
}
