import { spawn, spawnSync, type ChildProcessWithoutNullStreams } from 'node:child_process'
import { once } from 'node:events'
import { existsSync, readdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { readOwner, takeLock, withLock } from '../../../../server/start/lock-file.mjs'
import { repository } from '../../../../server/start/repository.mjs'
import { temporaryFolder } from '../../../support/temporary-folder'

const lockModule = JSON.stringify(join(repository, 'server', 'start', 'lock-file.mjs'))
/** Tries for the lock, prints whether it got it, and lives on until its input ends. */
const contender = (lock: string): string[] => [
  '--input-type=module',
  '-e',
  `import { takeLock } from ${lockModule}
   console.log(takeLock(${JSON.stringify(lock)}).holder === null ? 'got it' : 'held')
   process.stdin.resume()`,
]
const firstLine = async (child: ChildProcessWithoutNullStreams): Promise<string> =>
  String((await once(child.stdout, 'data')) as unknown[]).trim()

describe('takeLock', { timeout: 20_000 }, () => {
  it('gives a free lock and names us as its holder', () => {
    const lock = join(temporaryFolder(), 'new', 'a.lock')
    expect(takeLock(lock).holder).toBeNull()
    expect(readOwner(lock)?.pid).toBe(process.pid)
  })

  it('names the holder of a lock that is held', () => {
    const lock = join(temporaryFolder(), 'a.lock')
    takeLock(lock)
    expect(takeLock(lock).holder?.pid).toBe(process.pid)
  })

  it('takes over from a process that died with the lock, leaving nothing else behind', () => {
    const folder = temporaryFolder()
    const lock = join(folder, 'a.lock')
    expect(spawnSync(process.execPath, contender(lock), { input: '' }).stdout.toString()).toBe('got it\n')
    expect(existsSync(lock)).toBe(true)
    expect(takeLock(lock).holder).toBeNull()
    expect(readdirSync(folder)).toEqual(['a.lock'])
  })

  it('takes over a lock that was cut short while it was written', () => {
    const lock = join(temporaryFolder(), 'a.lock')
    writeFileSync(lock, '{"pid":')
    expect(takeLock(lock).holder).toBeNull()
  })

  it('lets exactly one of several processes take over', async () => {
    const lock = join(temporaryFolder(), 'a.lock')
    spawnSync(process.execPath, contender(lock), { input: '' })
    const children = Array.from({ length: 4 }, () => spawn(process.execPath, contender(lock)))
    const answers = await Promise.all(children.map(firstLine))
    for (const child of children) child.stdin.end()
    await Promise.all(children.map((child) => once(child, 'exit')))
    expect(answers.filter((answer) => answer === 'got it')).toHaveLength(1)
  })
})

describe('withLock', () => {
  it('lets one piece of work begin when the other has ended', async () => {
    const lock = join(temporaryFolder(), 'a.lock')
    const events: string[] = []
    let finishFirst: () => void = () => {}
    const secondWaits = new Promise<void>((resolve) => (finishFirst = resolve))
    const first = withLock(lock, async () => {
      events.push('first begins')
      await secondWaits
      events.push('first ends')
    })
    const second = withLock(
      lock,
      () => events.push('second'),
      () => {
        events.push('second waits')
        finishFirst()
      },
    )
    await Promise.all([first, second])
    expect(events.filter((event) => event !== 'second waits')).toEqual([
      'first begins',
      'first ends',
      'second',
    ])
  })

  it('gives the lock back when the work fails', async () => {
    const lock = join(temporaryFolder(), 'a.lock')
    const failing = withLock(lock, () => Promise.reject(new Error('broken')))
    await expect(failing).rejects.toThrow('broken')
    expect(existsSync(lock)).toBe(false)
  })
})
