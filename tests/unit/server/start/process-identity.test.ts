import { spawn, spawnSync } from 'node:child_process'
import { once } from 'node:events'
import { describe, expect, it } from 'vitest'
import { isRunning, processStart, thisProcess } from '../../../../server/start/process-identity.mjs'

describe('isRunning', () => {
  it('says yes to this process', () => {
    expect(isRunning(thisProcess())).toBe(true)
  })

  it('says no to a process that has ended', () => {
    expect(isRunning({ pid: spawnSync('true').pid, started: 'any' })).toBe(false)
  })

  it('says no to another process that got the same number', () => {
    expect(isRunning({ pid: process.pid, started: 'earlier' })).toBe(false)
  })

  it.each([null, { pid: process.pid, started: null }])('says no to %o', (owner) => {
    expect(isRunning(owner)).toBe(false)
  })
})

describe('processStart', () => {
  it('tells two processes apart and gives the same answer each time', () => {
    expect(processStart(process.pid)).toBe(processStart(process.pid))
    expect(processStart(process.pid)).not.toBe(processStart(process.ppid))
  })

  it('reads names with blanks and brackets', async () => {
    const child = spawn(process.execPath, [
      '-e',
      'process.title = "a) (b c"; console.log(); process.stdin.resume()',
    ])
    await once(child.stdout, 'data')
    expect(processStart(child.pid ?? 0)).toMatch(/ \d+$/)
    child.stdin.end()
    await once(child, 'exit')
  })

  it.each([0, -1, 1.5, NaN])('knows no process %d', (pid) => {
    expect(processStart(pid)).toBeNull()
  })
})
