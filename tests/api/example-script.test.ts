import { spawn } from 'node:child_process'
import { createServer, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { KeyScope } from '@shared/contracts/key'
import { repository } from '../../server/start/repository.mjs'
import { tableRowsOf } from '../support/analytic-files'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import { BOND, bondFile } from '../support/job-builder'
import { cleanEnvironment } from '../support/server-environment'

let server: ApiServer
let group: TestGroup
let http: Server
let folder: string
let histogram: string

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  http = createServer(server.app)
  await new Promise<void>((resolve) => http.listen(0, '127.0.0.1', resolve))
  folder = mkdtempSync(join(tmpdir(), 'beadwright-example-'))
  histogram = join(folder, 'bond.txt')
  writeFileSync(histogram, bondFile().text)
})

afterAll(async () => {
  await new Promise((resolve) => http.close(resolve))
  rmSync(folder, { recursive: true, force: true })
  await server.close()
})

interface Run {
  readonly status: number | null
  readonly out: string
  readonly said: string
}

/** Runs the script of the docs as its reader would. */
async function runExample(key: string, ...files: string[]): Promise<Run> {
  const url = `http://127.0.0.1:${(http.address() as AddressInfo).port}`
  const script = join(repository, 'docs', 'examples', 'first-table.mjs')
  const child = spawn(process.execPath, [script, ...files], {
    env: cleanEnvironment({ BEADWRIGHT_URL: url, BEADWRIGHT_KEY: key }),
  })
  let [out, said] = ['', '']
  child.stdout.on('data', (chunk: Buffer) => (out += chunk.toString()))
  child.stderr.on('data', (chunk: Buffer) => (said += chunk.toString()))
  const status = await new Promise<number | null>((resolve) => child.once('close', resolve))
  return { status, out, said }
}

const keyWith = async (scopes: KeyScope[], person = group.modeller): Promise<string> => {
  const wish = { name: 'example', scopes, expiresAt: null }
  return (await server.services.keys.make(person.member.userId, wish)).key
}

describe('the example script of the API', () => {
  it('goes from a repeat unit to the table of a bond', async () => {
    const { status, out, said } = await runExample(await keyWith(['read', 'write']), histogram)
    expect([status, said]).toEqual([0, expect.stringContaining('poly(vinyl acetate)')])
    const rows = tableRowsOf(out)
    expect(rows).toHaveLength(500)
    const energyOf = (r: number): number => 0.5 * BOND.stiffness * (r - BOND.length) ** 2
    // Within 6 kT of the minimum; a million counts leave hundredths of a kJ/mol, the zero is the minimum of the table.
    const near = rows.filter(([r]) => energyOf(r) < 20)
    expect(near.length).toBeGreaterThan(100)
    for (const [r, energy] of near) expect(Math.abs(energy - energyOf(r))).toBeLessThan(0.2)
  })

  it('says what a key lacks', async () => {
    const { status, out, said } = await runExample(await keyWith(['read']), histogram)
    expect([status, out]).toEqual([1, ''])
    expect(said).toContain('KEY_SCOPE_MISSING')
  })

  it('says when a person may not write, and when the key is wrong', async () => {
    const reviewer = await runExample(await keyWith(['read', 'write'], group.reviewer), histogram)
    expect([reviewer.status, reviewer.said]).toEqual([1, expect.stringContaining('may not write')])
    const wrong = await runExample('bw_wrong', histogram)
    expect([wrong.status, wrong.said]).toEqual([1, expect.stringContaining('KEY_INVALID')])
  })

  it('asks for what it needs', async () => {
    expect(await runExample('')).toMatchObject({ status: 2, out: '' })
  })
})
