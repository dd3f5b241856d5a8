import { readFileSync, rmSync } from 'node:fs'
import { createServer } from 'node:net'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Session } from '@shared/contracts/session'
import { launch, type Launched } from '../support/launcher'
import { persistentFolder } from '../support/persistent-folder'

interface Facts {
  readonly server: { readonly pid: number }
}

describe('npm start', () => {
  let dataFolder: string
  let running: Launched

  beforeAll(() => {
    dataFolder = persistentFolder()
  })

  afterAll(async () => {
    running.child.kill('SIGTERM')
    await running.ended
    rmSync(dataFolder, { recursive: true, force: true })
  })

  const demoPeople = async (url: string): Promise<string[]> => {
    const session = (await (await fetch(`${url}/api/session`)).json()) as Session
    return session.demoUsers.map(({ id }) => id)
  }
  const environment = () => ({ DATA_DIR: dataFolder, PORT: '0' })

  it('ends with the ready line on a folder without anything, and loses nothing to kill -9', async () => {
    running = launch(environment())
    const url = await running.ready
    expect(running.said().trimEnd().split('\n').at(-1)).toBe(`Beadwright is ready: ${url}`)
    expect(running.said()).toMatch(/^First owner: open \S+\/set-up\/\S+$/m)
    const people = await demoPeople(url)
    expect(people).toHaveLength(4)

    const { server } = JSON.parse(readFileSync(join(dataFolder, 'running.json'), 'utf8')) as Facts
    const postmaster = Number(
      readFileSync(join(dataFolder, 'postgres', 'cluster', 'postmaster.pid'), 'utf8').split('\n')[0],
    )
    running.child.kill('SIGKILL')
    for (const pid of [server.pid, postmaster]) process.kill(pid, 'SIGKILL')
    await running.ended

    running = launch(environment())
    expect(await demoPeople(await running.ready)).toEqual(people)
  })

  it('started twice, the second says where the first runs and ends well', async () => {
    const url = await running.ready
    const second = launch(environment())
    expect(await second.ready).toBe(url)
    expect(second.said()).toContain(`Beadwright already runs at ${url}.`)
    expect(await second.ended).toBe(0)
  })

  it('says so when the port asked for is taken', async () => {
    const other = createServer().listen(0, '127.0.0.1')
    await new Promise((resolve) => other.once('listening', resolve))
    const address = other.address()
    const port = typeof address === 'object' && address !== null ? address.port : 0
    const folder = persistentFolder()
    try {
      const refused = launch({ DATA_DIR: folder, PORT: String(port) })
      expect(await refused.ended).toBe(1)
      expect(refused.said()).toContain(`Port ${port} is taken by another program: choose another with PORT.`)
    } finally {
      other.close()
      rmSync(folder, { recursive: true, force: true })
    }
  })

  it('stops everything it started when told to', async () => {
    const url = await running.ready
    const postmasterFile = join(dataFolder, 'postgres', 'cluster', 'postmaster.pid')
    expect(readFileSync(postmasterFile, 'utf8')).not.toBe('')
    running.child.kill('SIGINT')
    await running.ended
    await expect(fetch(`${url}/api/health`)).rejects.toThrow()
    expect(() => readFileSync(postmasterFile)).toThrow(/ENOENT/)
  })
})
