import { createHash } from 'node:crypto'
import { strFromU8, unzipSync } from 'fflate'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Distribution } from '@shared/contracts/distribution'
import { createHistogram } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS, invert, type InversionSettings } from '@shared/inversion'
import { formatRows, makeTable, tableRows } from '@shared/tables'
import type { ApiClient } from '../support/api-client'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import {
  ANGLE_SETTINGS,
  angleFile,
  BOND,
  BOND_SETTINGS,
  bondFile,
  buildJob,
  type Job,
  TEMPERATURE,
  termId,
  withTypes,
} from '../support/job-builder'

let server: ApiServer
let group: TestGroup
let client: ApiClient
let job: Job

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  client = group.reviewer.client
  job = await buildJob(server.services, group.modeller.member, { joint: false })
  await bring(job.angleId)
})

afterAll(() => server.close())

async function bring(term: string, settings = ANGLE_SETTINGS, file = angleFile()): Promise<void> {
  const upload = { statePointId: job.statePointId, settings }
  const response = await group.modeller.client.upload(`/api/terms/${term}/distributions`, upload, file)
  expect(response.status, response.text).toBe(201)
}

async function savePotential(term: string, settings: InversionSettings = DEFAULT_INVERSION_SETTINGS) {
  const path = `/api/terms/${term}/potential`
  const stored = await client.get(`${path}?statePoint=${job.statePointId}`)
  const revision = stored.status === 200 ? (stored.body as { revision: number }).revision : null
  const body = { statePointId: job.statePointId, revision, settings }
  const response = await group.modeller.client.put(path, body)
  expect(response.status, response.text).toBe(200)
}

const table = (term = job.bondId, units = '') =>
  client.get(`/api/terms/${term}/table?statePoint=${job.statePointId}${units}`)

const rowsOf = (text: string): string =>
  text
    .split('\n')
    .filter((line) => !line.startsWith('#'))
    .join('\n')

const numbersOf = (text: string): number[][] =>
  rowsOf(text)
    .trim()
    .split('\n')
    .map((line) => line.trim().split(/\s+/).map(Number))

async function archive(
  units = '',
): Promise<{ files: Record<string, string>; bytes: Buffer; headers: Headers }> {
  const response = await client
    .raw('get', `/api/mappings/${job.mappingId}/tables.zip?statePoint=${job.statePointId}${units}`)
    .buffer(true)
    .parse((stream, done) => {
      const chunks: Buffer[] = []
      stream.on('data', (chunk: Buffer) => chunks.push(chunk))
      stream.on('end', () => done(null, Buffer.concat(chunks)))
    })
  expect(response.status).toBe(200)
  const bytes = response.body as Buffer
  const entries = Object.entries(unzipSync(bytes)).map(([name, content]) => [name, strFromU8(content)])
  return {
    files: Object.fromEntries(entries) as Record<string, string>,
    bytes,
    headers: response.headers,
  }
}

type Headers = Record<string, string>

describe('the table of a term', () => {
  it('holds the very numbers that the core works out from the stored distribution', async () => {
    const response = await client.get(`/api/terms/${job.bondId}/distribution?statePoint=${job.statePointId}`)
    const { kind, edges, weights, content, independentSamples } = response.body as Distribution
    const histogram = createHistogram({ kind, edges, weights, content, independentSamples })
    for (const [units, coordinateUnit, energyUnit] of [
      ['', 'nm', 'kJ/mol'],
      ['&length=angstrom&energy=kcal/mol', 'angstrom', 'kcal/mol'],
      ['&energy=kT', 'nm', 'kT'],
    ] as const) {
      const inverted = invert(histogram, TEMPERATURE, DEFAULT_INVERSION_SETTINGS)
      const expected = makeTable(inverted.potential, DEFAULT_INVERSION_SETTINGS.table)
      const { text } = await table(job.bondId, units)
      expect(rowsOf(text)).toBe(formatRows(expected, { coordinateUnit, energyUnit }))
      const rows = tableRows(expected, { coordinateUnit, energyUnit })
      expect(numbersOf(text)).toEqual(
        rows.map(({ coordinate, energy, force }) => [coordinate, energy, force]),
      )
    }
  })

  it('is the potential the counts were made from', async () => {
    // Expected counts of U = ½ k (r − r₀)²: within 0.05 kT wherever the density is above 1 % of its peak (U < 4.6 kT).
    const kT = 8.31446261815324e-3 * TEMPERATURE
    const within = numbersOf((await table()).text)
      .map(([r, energy]) => ({ exact: 0.5 * BOND.stiffness * (r - BOND.length) ** 2, energy }))
      .filter(({ exact }) => exact < 4.6 * kT)
    expect(within.length).toBeGreaterThan(20)
    for (const { exact, energy } of within) expect(Math.abs(energy - exact)).toBeLessThan(0.05 * kT)
  })

  it('says what it is, where it comes from, and when it was saved', async () => {
    const response = await table()
    const { text } = response
    const today = new Date().toISOString().slice(0, 10)
    for (const line of ['# term: A–A', '# state point: 400 K, melt', `# saved: ${today}`])
      expect(text).toContain(line)
    expect(text).toContain('Two beads, revision 1')
    expect(text).toContain(createHash('sha256').update(bondFile().text).digest('hex'))
    expect(text).not.toContain('INVENTED')
    expect(response.headers['content-type']).toBe('text/plain; charset=utf-8')
    expect(response.headers['content-disposition']).toBe('attachment; filename=bond_A-A_400K.txt')
  })

  it('carries the checksum of its own rows', async () => {
    const { text } = await table()
    const checksum = /# rows: SHA-256 ([0-9a-f]{64})/.exec(text)?.[1]
    expect(checksum).toBe(createHash('sha256').update(rowsOf(text)).digest('hex'))
  })

  it('is the same to the last byte each time it is asked for', async () => {
    expect((await table()).text).toBe((await table()).text)
  })

  it('follows the saved settings', async () => {
    await savePotential(job.bondId, {
      ...DEFAULT_INVERSION_SETTINGS,
      table: { rows: 51, low: 0.2, high: 0.45, cap: null },
    })
    const numbers = numbersOf((await table()).text)
    expect(numbers).toHaveLength(51)
    expect([numbers[0][0], numbers[50][0]]).toEqual([0.2, 0.45])
    await savePotential(job.bondId)
  })

  it('is there only for a saved potential', async () => {
    expect((await table(job.angleId)).status).toBe(404)
    const response = await table(termId(job.terms, 'B–A–A–B'))
    expect(response.status).toBe(404)
    expect((response.body as { message: string }).message).toContain('no data at this state point')
  })

  it('is held back while the potential is stale', async () => {
    await group.modeller.client.patch(`/api/distributions/${job.distributionId}`, { independentSamples: 500 })
    const response = await table()
    expect(response.status).toBe(409)
    expect(response.body).toMatchObject({ code: 'CONFLICT' })
    await group.modeller.client.patch(`/api/distributions/${job.distributionId}`, {
      independentSamples: null,
    })
    expect((await table()).status).toBe(200)
  })

  it('holds the numbers of the form the settings name, and says which with its parameters', async () => {
    await savePotential(job.bondId, { ...DEFAULT_INVERSION_SETTINGS, form: 'harmonic' })
    const { text } = await table()
    await savePotential(job.bondId)
    // The file counts centres of 2 pm bins where the fit integrates over them: k comes out softer by about w²k/12kT, 0.04 %.
    const k = Number(/k = ([\d.]+)/.exec(text)?.[1])
    const r0 = Number(/r0 = ([\d.]+)/.exec(text)?.[1])
    expect(Math.abs(k / BOND.stiffness - 1)).toBeLessThan(0.001)
    expect(Math.abs(r0 - BOND.length)).toBeLessThan(1e-4)
    for (const [r, energy, force] of numbersOf(text)) {
      expect(Math.abs(energy - 0.5 * k * (r - r0) ** 2)).toBeLessThan(1e-3 * (1 + energy))
      expect(Math.abs(force + k * (r - r0))).toBeLessThan(1e-3 * (1 + Math.abs(force)))
    }
    expect(rowsOf((await table()).text)).not.toBe(rowsOf(text))
  })

  it('is refused in units that are none', async () => {
    for (const units of ['&length=inch', '&angle=gon', '&energy=eV']) {
      expect((await table(job.bondId, units)).status).toBe(400)
    }
  })
})

describe('the archive of all tables', () => {
  it('holds the same files as one by one, and a README', async () => {
    await savePotential(job.angleId)
    const { files, headers } = await archive()
    expect(Object.keys(files)).toEqual(['README.txt', 'bond_A-A_400K.txt', 'angle_A-A-A_400K.txt'])
    expect(files['bond_A-A_400K.txt']).toBe((await table()).text)
    expect(files['angle_A-A-A_400K.txt']).toBe((await table(job.angleId)).text)
    expect(headers['content-type']).toBe('application/zip')
    expect(headers['content-disposition']).toMatch(/filename=Polymer-[\w-]+_Two-beads_400K_tables\.zip/)
  })

  it('explains every file, its units and signs, and names the terms without a table with the reason', async () => {
    await bring(termId(job.terms, 'A–A–B'))
    const { files } = await archive('&length=angstrom&angle=radian&energy=kT')
    const readme = files['README.txt']
    for (const name of Object.keys(files)) if (name !== 'README.txt') expect(readme).toContain(name)
    for (const text of [
      '400 K',
      'kT is taken at 400 K',
      'minus the derivative',
      'pi is straight',
      'pi is trans',
      'right-hand rule',
      'valid at this one state point',
      'angle A–A–B: data, but no saved potential',
      'bond A–B: no data at this state point',
      'SHA-256',
    ]) {
      expect(readme).toContain(text)
    }
    expect(readme).not.toContain('INVENTED')
    const columns = files['angle_A-A-A_400K.txt']
      .split('\n')
      .filter((line) => line.startsWith('#'))
      .at(-1)
    expect(columns).toContain('rad')
    expect(columns).toContain('kT')
  })

  it('is the same to the last byte each time it is asked for', async () => {
    const [one, other] = [await archive(), await archive()]
    expect(one.bytes.equals(other.bytes)).toBe(true)
  })

  it('is not there while no term has a table', async () => {
    const empty = await group.modeller.client.post(`/api/polymers/${job.polymerId}/mappings`, {
      name: 'Empty',
    })
    const { id } = empty.body as { id: string }
    const response = await client.get(`/api/mappings/${id}/tables.zip?statePoint=${job.statePointId}`)
    expect(response.status).toBe(404)
  })

  it('holds no table of a term that the mapping leaves out, and says why', async () => {
    const mapping = `/api/mappings/${job.mappingId}`
    const { revision, document } = (await client.get(mapping)).body as { revision: number; document: object }
    const choice = { types: ['A', 'A', 'A'], placeKey: '', use: 'left out', reason: 'stiff enough' }
    const fewer = { revision, name: 'Two beads', document: { ...document, termChoices: [choice] } }
    expect((await group.modeller.client.put(mapping, fewer)).status).toBe(200)
    const { files } = await archive()
    expect(Object.keys(files)).toEqual(['README.txt', 'bond_A-A_400K.txt'])
    expect(files['README.txt']).toContain('Terms left out of the set')
    expect(files['README.txt']).toContain('angle A–A–A: stiff enough')
    await group.modeller.client.put(mapping, { revision: revision + 1, name: 'Two beads', document })
  })

  it('keeps files apart whose types differ by capitals only', async () => {
    const mapping = `/api/mappings/${job.mappingId}`
    const { revision, document } = (await client.get(mapping)).body as { revision: number; document: object }
    const renamed = { revision, name: 'Two beads', document: withTypes({ B: 'a' }) }
    expect((await group.modeller.client.put(mapping, renamed)).status).toBe(200)
    await bring(termId(job.terms, 'A–B'), BOND_SETTINGS, bondFile())
    await savePotential(termId(job.terms, 'A–B'))
    const ringBonds = Object.keys((await archive()).files).filter((name) => name.startsWith('bond'))
    expect(ringBonds).toHaveLength(2)
    await group.modeller.client.put(mapping, { revision: revision + 1, name: 'Two beads', document })
  })
})

describe('tables of a demo', () => {
  it('say in every file that their data are invented', async () => {
    const demo = await buildGroup(server, { demo: true })
    const made = await buildJob(server.services, demo.modeller.member, { joint: false })
    const units = { length: 'nm', angle: 'degree', energy: 'kJ/mol' } as const
    const { bytes } = await server.services.tables.archive(
      demo.owner.member,
      made.mappingId,
      made.statePointId,
      units,
    )
    const files = Object.values(unzipSync(bytes)).map((content) => strFromU8(content))
    expect(files).toHaveLength(2)
    for (const text of files) expect(text).toContain('INVENTED')
    const polymer = await demo.owner.client.get(`/api/polymers/${made.polymerId}`)
    expect(polymer.body).toMatchObject({ demo: true })
  })
})
