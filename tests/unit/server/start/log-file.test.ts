import { closeSync, readFileSync, statSync, truncateSync, writeFileSync, writeSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { openLog } from '../../../../server/start/log-file.mjs'
import { temporaryFolder } from '../../../support/temporary-folder'

describe('openLog', () => {
  it('adds to the log and shows only what this run wrote', () => {
    const path = join(temporaryFolder(), 'logs', 'server.log')
    for (const text of ['über\n', 'second\n']) {
      const log = openLog(path)
      writeSync(log.descriptor, text)
      expect(log.written()).toBe(text)
      closeSync(log.descriptor)
    }
    expect(readFileSync(path, 'utf8')).toBe('über\nsecond\n')
  })

  it('lets nobody else read it', () => {
    const path = join(temporaryFolder(), 'logs', 'server.log')
    closeSync(openLog(path).descriptor)
    expect(statSync(path).mode & 0o777).toBe(0o600)
    expect(statSync(join(path, '..')).mode & 0o777).toBe(0o700)
  })

  it('puts a large log aside', () => {
    const path = join(temporaryFolder(), 'server.log')
    writeFileSync(path, 'old')
    truncateSync(path, 20_000_001)
    closeSync(openLog(path).descriptor)
    expect(statSync(path).size).toBe(0)
    expect(statSync(`${path}.1`).size).toBe(20_000_001)
  })
})
