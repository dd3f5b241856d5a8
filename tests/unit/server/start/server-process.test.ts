import { mkdirSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { isRunning } from '../../../../server/start/process-identity.mjs'
import { startServer } from '../../../../server/start/server-process.mjs'
import { temporaryFolder } from '../../../support/temporary-folder'

function rootWithServer(code: string) {
  const root = temporaryFolder()
  mkdirSync(join(root, 'dist', 'server'), { recursive: true })
  writeFileSync(join(root, 'dist', 'server', 'index.js'), code)
  return { root, env: { PATH: process.env.PATH }, logFile: join(root, 'server.log') }
}

describe('startServer', () => {
  it('reads the port and the set-up path, and logs all else but these', async () => {
    const options = rootWithServer(`
      console.error('{"level":"info"}')
      console.log('set-up /set-up/secret')
      console.log('plain words')
      console.log('listening 4321')
      process.stdin.on('data', () => {})
      setInterval(() => {}, 1000)`)
    const server = await startServer(options)
    expect(server.port).toBe(4321)
    expect(server.setUpPath).toBe('/set-up/secret')
    await server.stop()
    await expect(server.ended).resolves.toBe('signal SIGTERM')
    expect(isRunning(server.owner)).toBe(false)
    expect(readFileSync(options.logFile, 'utf8')).toBe('{"level":"info"}\nplain words\n')
  })

  it('shows the end of the log of a server that fails, without that of earlier runs', async () => {
    const options = rootWithServer(`console.error('no database'); process.exitCode = 3`)
    writeFileSync(options.logFile, 'earlier\n')
    await expect(startServer(options)).rejects.toMatchObject({
      message: `The server ended before it was ready (exit code 3). Its log: ${options.logFile}`,
      details: 'no database',
    })
  })
})
