import { spawn } from 'node:child_process'
import { once } from 'node:events'
import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it, onTestFinished } from 'vitest'
import {
  isPostgresOf,
  postgresProcessesOf,
  readPostmasterFile,
} from '../../../../server/start/postmaster-file.mjs'
import { temporaryFolder } from '../../../support/temporary-folder'

function folderWithFile(state: string): string {
  const folder = temporaryFolder()
  const lines = ['4711', folder, '1764567890', '54330', '', '127.0.0.1', '  131 99', state, '']
  writeFileSync(join(folder, 'postmaster.pid'), lines.join('\n'))
  return folder
}

describe('readPostmasterFile', () => {
  it('reads process, port and state', () => {
    expect(readPostmasterFile(folderWithFile('ready   '))).toEqual({ pid: 4711, port: 54330, ready: true })
  })

  it('does not take a starting server for a ready one', () => {
    expect(readPostmasterFile(folderWithFile('starting'))?.ready).toBe(false)
  })

  it('gives null where no server was', () => {
    expect(readPostmasterFile(temporaryFolder())).toBeNull()
  })
})

describe.runIf(process.platform === 'linux')('isPostgresOf', () => {
  it('tells a process of the data directory from one that got its number', async () => {
    const folder = temporaryFolder()
    const child = spawn('cat', { cwd: folder })
    onTestFinished(() => {
      child.kill('SIGKILL')
    })
    await once(child, 'spawn')
    const pid = child.pid ?? 0
    expect(isPostgresOf(folder, pid)).toBe(true)
    expect(postgresProcessesOf(folder)).toEqual([pid])
    expect(isPostgresOf(temporaryFolder(), pid)).toBe(false)
  })
})
