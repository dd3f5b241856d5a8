import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { Distribution } from '@shared/contracts/distribution'
import type { StoredPotential } from '@shared/contracts/potential'
import { blockInefficiency } from '@shared/histogram'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { createRandom } from '@shared/numeric'
import type { ApiClient, TextFile } from '../support/api-client'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import { ANGLE_SETTINGS, BOND_SETTINGS, buildJob, type Job } from '../support/job-builder'

let server: ApiServer
let group: TestGroup
let client: ApiClient
let job: Job

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  client = group.modeller.client
})

beforeEach(async () => {
  job = await buildJob(server.services, group.modeller.member, { joint: false })
})

afterAll(() => server.close())

/** Twelve blocks of a bond about 0.3 nm, each count standing for three equal ones. */
const COUNTS = (() => {
  const random = createRandom(31)
  return Array.from({ length: 12 }, () =>
    Float64Array.from(
      { length: 40 },
      (_, bin) => 3 * random.poisson(200 * Math.exp(-(((bin - 20) / 8) ** 2))),
    ),
  )
})()
const WHOLE = COUNTS[0].map((_, bin) => COUNTS.reduce((sum, block) => sum + block[bin], 0))
const TOTAL = WHOLE.reduce((sum, count) => sum + count, 0)
const file = (counts: Float64Array, name: string): TextFile => ({
  name,
  text: Array.from(counts, (count, bin) => `${(0.261 + 0.002 * bin).toFixed(3)} ${count}\n`).join(''),
})
const whole = file(WHOLE, 'whole.txt')
const parts = COUNTS.map((counts, block) => file(counts, `part${block + 1}.txt`))
const expected = (kind: 'time' | 'chain') => blockInefficiency({ kind, counts: COUNTS })

const bring = (
  main: TextFile,
  given: Parameters<ApiClient['upload']>[3],
  more: object = {},
  settings: object = BOND_SETTINGS,
  termId = job.bondId,
) =>
  client.upload(
    `/api/terms/${termId}/distributions`,
    { statePointId: job.statePointId, settings, ...more },
    main,
    given,
  )

const potential = async (): Promise<StoredPotential> =>
  (await client.get(`/api/terms/${job.bondId}/potential?statePoint=${job.statePointId}`))
    .body as StoredPotential

const save = async (settings = DEFAULT_INVERSION_SETTINGS): Promise<StoredPotential> => {
  const { revision } = await potential()
  const body = { statePointId: job.statePointId, revision, settings }
  const response = await client.put(`/api/terms/${job.bondId}/potential`, body)
  expect(response.status, response.text).toBe(200)
  return response.body as StoredPotential
}

const table = async (): Promise<string> => {
  const response = await client.get(`/api/terms/${job.bondId}/table?statePoint=${job.statePointId}`)
  expect(response.status, response.text).toBe(200)
  return response.text
}

describe('a distribution with block files', () => {
  it('has their inefficiency, and stands for its counts divided by it', async () => {
    const response = await bring(whole, { chains: parts })
    expect(response.status, response.text).toBe(201)
    const { blocks, independentSamples, notes, settings } = response.body as Distribution
    expect(blocks).toEqual(expected('chain'))
    expect(independentSamples).toBeCloseTo(TOTAL / expected('chain').inefficiency, 6)
    expect(settings.independentSamples).toBeNull()
    expect(notes.join()).toContain('12 chains')
    const read = await client.get(`/api/terms/${job.bondId}/distribution?statePoint=${job.statePointId}`)
    expect(read.body).toEqual(response.body)
  })

  it('is their sum when the file is the first of them', async () => {
    const response = await bring(parts[0], { blocks: parts.slice(1) }, { firstOf: 'time' })
    expect(response.status, response.text).toBe(201)
    const { weights, blocks } = response.body as Distribution
    expect(weights).toEqual([...WHOLE])
    expect(blocks).toEqual(expected('time'))
  })

  it('keeps the counts and the file of each block, and lets go of them with the distribution', async () => {
    const { id } = (await bring(parts[0], { chains: parts.slice(1) }, { firstOf: 'chain' }))
      .body as Distribution
    const rows = (): Promise<{ position: number; name: string | null; counts: number[] }[]> =>
      server.dataSource.query(
        `select "position", "name", "counts" from "distribution_block" where "distribution_id" = $1 order by "position"`,
        [id],
      )
    const stored = await rows()
    expect(stored.map(({ name }) => name)).toEqual([null, ...parts.slice(1).map(({ name }) => name)])
    stored.forEach(({ counts }, block) => expect(counts).toEqual([...COUNTS[block]]))
    expect((await client.delete(`/api/distributions/${id}`)).status).toBe(204)
    expect(await rows()).toEqual([])
  })

  it('is refused with the name of the file to blame, and nothing is stored', async () => {
    const before = await client.get(`/api/terms/${job.bondId}/distribution?statePoint=${job.statePointId}`)
    const shifted = { name: 'shifted.txt', text: parts[0].text.replaceAll(/^0\.(\d+)/gm, '0.1$1') }
    const other = await bring(whole, { blocks: [...parts, shifted] })
    expect(other.status).toBe(422)
    expect(other.body).toMatchObject({ code: 'BLOCKS_DIFFER', field: 'blocks' })
    expect((other.body as { message: string }).message).toContain('shifted.txt')
    const few = await bring(whole, { blocks: parts.slice(0, 9) })
    expect(few.body).toMatchObject({ code: 'TOO_FEW_BLOCKS' })
    const after = await client.get(`/api/terms/${job.bondId}/distribution?statePoint=${job.statePointId}`)
    expect((after.body as Distribution).id).toBe((before.body as Distribution).id)
  })

  it('has a note of the correlation of raw samples, which blocks do not change', async () => {
    const random = createRandom(32)
    let bend = 0
    const lines = Array.from({ length: 4000 }, () => (bend = 0.9 * bend + 4 * random.normal())).map((value) =>
      (120 + value).toFixed(4),
    )
    const settings = { ...ANGLE_SETTINGS, layout: 'samples', columns: { low: 0, high: 0, value: 0 } }
    const samples = { name: 'angles.txt', text: lines.join('\n') }
    const response = await bring(samples, {}, {}, settings, job.angleId)
    expect(response.status, response.text).toBe(201)
    const { sampleInefficiency, blocks, independentSamples } = response.body as Distribution
    const { inefficiency, deviation } = sampleInefficiency!.autocorrelation
    // (1 + 0.9)/(1 − 0.9) = 19: analytic.
    expect(Math.abs(inefficiency - 19)).toBeLessThan(4 * deviation)
    expect([blocks, independentSamples]).toEqual([null, 4000])
  })

  it('takes no block files for a pair of terms', async () => {
    const path = `/api/mappings/${job.mappingId}/joint-distributions`
    const response = await client.upload(path, {}, whole, { blocks: parts })
    expect(response.body).toMatchObject({ code: 'VALIDATION_FAILED', field: 'file' })
  })
})

describe('a saved potential', () => {
  it('is out of date when blocks come with the same file, when samples are stated, and when they are taken back', async () => {
    const first = (await bring(whole, {})).body as Distribution
    await save()
    expect((await potential()).stale).toBe(false)
    const { id } = (await bring(whole, { chains: parts })).body as Distribution
    expect(id).not.toBe(first.id)
    expect((await potential()).stale).toBe(true)
    await save()
    expect((await potential()).stale).toBe(false)
    await client.patch(`/api/distributions/${id}`, { independentSamples: 500 })
    expect((await potential()).stale).toBe(true)
    const taken = await client.patch(`/api/distributions/${id}`, { independentSamples: null })
    // What blocks say comes back, and with it the very input that was inverted.
    expect((taken.body as Distribution).blocks).toEqual(expected('chain'))
    expect((await potential()).stale).toBe(false)
  })

  it('gives the same file again, byte by byte, and the same rows and checksum when the same settings are saved again', async () => {
    await bring(whole, { chains: parts })
    const { revision } = await save()
    const [one, two] = [await table(), await table()]
    expect(two).toBe(one)
    const saved = await save()
    expect(saved.revision).toBe(revision + 1)
    const again = await table()
    const withoutDate = (text: string) => text.replace(/^# saved: .*$/m, '')
    // Only the day it was saved could differ, at midnight.
    expect(withoutDate(again)).toBe(withoutDate(one))
    expect(/^# rows: SHA-256 [0-9a-f]{64}$/m.exec(again)?.[0]).toBe(/^# rows: SHA-256 .*$/m.exec(one)?.[0])
  })

  it('keeps all settings that the bench offers, and writes another table by them', async () => {
    await bring(whole, { chains: parts })
    await save()
    const before = await table()
    const settings = { ...DEFAULT_INVERSION_SETTINGS, inefficiency: 20, tails: { stiffness: 2 } }
    expect((await save(settings)).settings).toEqual(settings)
    expect(await table()).not.toBe(before)
    const body = { statePointId: job.statePointId, revision: (await potential()).revision }
    for (const wrong of [{ inefficiency: 0.5 }, { tails: { stiffness: 100 } }, { straightAngle: 'bent' }]) {
      const response = await client.put(`/api/terms/${job.bondId}/potential`, {
        ...body,
        settings: { ...settings, ...wrong },
      })
      expect(response.status, JSON.stringify(wrong)).toBe(400)
    }
  })

  it('reads settings that were saved before a choice existed with its default', async () => {
    const { version, jacobian, smoothing, table: extent } = DEFAULT_INVERSION_SETTINGS
    await server.dataSource.query(`update "potential" set "settings" = $1 where "id" = $2`, [
      { version, jacobian, smoothing, table: extent },
      job.potentialId,
    ])
    expect((await potential()).settings).toEqual(DEFAULT_INVERSION_SETTINGS)
    expect(await table()).toContain('# tails: quadratic')
  })

  it('is not there for a term that is not', async () => {
    const response = await client.get(`/api/terms/${randomUUID()}/potential?statePoint=${job.statePointId}`)
    expect(response.status).toBe(404)
  })
})
