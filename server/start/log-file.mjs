import { fstatSync, mkdirSync, openSync, readFileSync, renameSync, statSync } from 'node:fs'
import { dirname } from 'node:path'

const ROTATE_ABOVE_BYTES = 20_000_000

/**
 * Opens a log for appending, readable by us alone; a large one is put aside as `.1` first.
 *
 * @returns {{ descriptor: number, written: () => string }} `written` is what was added since
 */
export function openLog(path) {
  mkdirSync(dirname(path), { recursive: true, mode: 0o700 })
  const size = statSync(path, { throwIfNoEntry: false })?.size ?? 0
  if (size > ROTATE_ABOVE_BYTES) renameSync(path, `${path}.1`)
  const descriptor = openSync(path, 'a', 0o600)
  const begin = fstatSync(descriptor).size
  return { descriptor, written: () => readFileSync(path).subarray(begin).toString() }
}
