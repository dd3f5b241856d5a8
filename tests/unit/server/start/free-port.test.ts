import { once } from 'node:events'
import { createServer, type AddressInfo } from 'node:net'
import { describe, expect, it, onTestFinished } from 'vitest'
import { isPortFree, nextFreePort } from '../../../../server/start/free-port.mjs'

async function takenPort(): Promise<number> {
  const server = createServer().listen(0, '127.0.0.1')
  onTestFinished(() => void server.close())
  await once(server, 'listening')
  return (server.address() as AddressInfo).port
}

describe('nextFreePort', () => {
  it('passes over a taken port', async () => {
    const taken = await takenPort()
    expect(await isPortFree(taken)).toBe(false)
    expect(await nextFreePort(taken)).toBeGreaterThan(taken)
  })

  it('gives a port that is free', async () => {
    expect(await isPortFree(await nextFreePort(20_000))).toBe(true)
  })

  it('ends at the last port there is', async () => {
    await expect(nextFreePort(65_536)).rejects.toThrow(RangeError)
  })
})
