import { createHash } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import { type Distribution, MAX_FILE_BYTES } from '@shared/contracts/distribution'
import type { Term } from '@shared/contracts/mapping'
import type { StoredPotential } from '@shared/contracts/potential'
import type { ApiClient, TextFile } from '../support/api-client'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import {
  ANGLE_SETTINGS,
  angleFile,
  BOND_SETTINGS,
  bondFile,
  buildJob,
  type Job,
} from '../support/job-builder'

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

const bring = (file: TextFile, settings: object = BOND_SETTINGS, termId = job.bondId) =>
  client.upload(`/api/terms/${termId}/distributions`, { statePointId: job.statePointId, settings }, file)

const current = (termId = job.bondId) =>
  client.get(`/api/terms/${termId}/distribution?statePoint=${job.statePointId}`)

async function rows(table: string): Promise<number> {
  const [{ count }]: { count: number }[] = await server.dataSource.query(
    `select count(*)::int as count from "${table}"`,
  )
  return count
}

describe('a distribution', () => {
  it('is read by the server, in internal units, and kept with where it came from', async () => {
    const file = angleFile('angle_A-A-A.txt')
    const response = await bring(file, ANGLE_SETTINGS, job.angleId)
    expect(response.status).toBe(201)
    const distribution = response.body as Distribution
    expect(distribution).toMatchObject({
      kind: 'angle',
      content: 'count',
      settings: ANGLE_SETTINGS,
      demo: false,
      file: {
        name: 'angle_A-A-A.txt',
        size: Buffer.byteLength(file.text),
        sha256: createHash('sha256').update(file.text).digest('hex'),
        uploadedBy: { name: 'The modeller' },
      },
    })
    expect(distribution.edges).toHaveLength(91)
    expect(distribution.edges[90]).toBeCloseTo(Math.PI, 12)
    expect(distribution.weights.reduce((sum, weight) => sum + weight, 0)).toBeCloseTo(1e6, 2)
    expect(Math.abs(Date.parse(distribution.file.uploadedAt) - Date.now())).toBeLessThan(60_000)
    expect((await current(job.angleId)).body).toEqual(distribution)
  })

  it('gives its file back to the last byte', async () => {
    const file = { name: 'Länge µ "r".txt', text: bondFile().text.replaceAll('\n', '\r\n') }
    const { id } = (await bring(file)).body as Distribution
    const { agentBytes, headers } = await download(`/api/distributions/${id}/file`)
    expect(agentBytes.toString()).toBe(file.text)
    expect(String(headers['content-disposition'])).toContain(
      "filename*=UTF-8''L%C3%A4nge%20%C2%B5%20%22r%22.txt",
    )
    expect(headers['content-type']).toBe('application/octet-stream')
  })

  it('keeps of a name neither folders nor line breaks', async () => {
    const { file } = (await bring({ ...bondFile(), name: 'C:\\data\\run 7\\bond.txt' })).body as Distribution
    expect(file.name).toBe('bond.txt')
  })

  it('is replaced by a newer one, which does not destroy it', async () => {
    const before = (await current()).body as Distribution
    const newer = (await bring(bondFile('newer.txt', 5e5))).body as Distribution
    expect(newer.id).not.toBe(before.id)
    expect((await current()).body).toMatchObject({ id: newer.id, file: { name: 'newer.txt' } })
    expect((await client.get(`/api/distributions/${before.id}/file`)).status).toBe(200)
  })

  it('is one when several are brought in at the same moment', async () => {
    const responses = await Promise.all([1, 2, 3, 4].map((each) => bring(bondFile(`bond${each}.txt`))))
    expect(responses.map(({ status }) => status)).toEqual([201, 201, 201, 201])
    const now = (await current()).body as Distribution
    expect(responses.map(({ body }) => (body as Distribution).id)).toContain(now.id)
    const [{ count }]: { count: number }[] = await server.dataSource.query(
      'select count(*)::int as count from "distribution" where "term_id" = $1 and "superseded_at" is null',
      [job.bondId],
    )
    expect(count).toBe(1)
  })

  it('takes the number of independent samples the user states, and gives it back', async () => {
    const stated = await client.patch(`/api/distributions/${job.distributionId}`, {
      independentSamples: 2500,
    })
    expect(stated.body).toMatchObject({ independentSamples: 2500, settings: { independentSamples: 2500 } })
    const before = (await current()).body as Distribution
    expect(before.weights.reduce((sum, weight) => sum + weight, 0)).toBeCloseTo(1e6, 2)
    const taken = await client.patch(`/api/distributions/${job.distributionId}`, { independentSamples: null })
    expect(taken.body).toMatchObject({ settings: { independentSamples: null } })
    const tooMany = await client.patch(`/api/distributions/${job.distributionId}`, {
      independentSamples: 2e6,
    })
    expect(tooMany.status).toBe(422)
    expect(tooMany.body).toMatchObject({ code: 'SETTING_INVALID', field: 'independentSamples' })
  })

  it('takes its files and the potential along when it is deleted, with those it replaced', async () => {
    await bring(bondFile('newer.txt'))
    const { id } = (await current()).body as Distribution
    const [files, potentials] = [await rows('source_file'), await rows('potential')]
    expect((await client.delete(`/api/distributions/${id}`)).status).toBe(204)
    expect((await current()).status).toBe(404)
    expect(await rows('source_file')).toBe(files - 2)
    expect(await rows('potential')).toBe(potentials - 1)
    expect((await client.get(`/api/distributions/${job.distributionId}/file`)).status).toBe(404)
  })

  it('of another kind than its term is refused', async () => {
    const response = await bring(angleFile(), ANGLE_SETTINGS, job.bondId)
    expect(response.status).toBe(400)
    expect(response.body).toMatchObject({ code: 'VALIDATION_FAILED', field: 'settings.kind' })
  })
})

describe('a file that cannot be right', () => {
  const lines = bondFile().text.split('\n')
  const withLine = (line: number, text: string): TextFile => {
    const changed = [...lines]
    changed[line - 1] = text
    return { name: 'wrong.txt', text: changed.join('\n') }
  }

  it.each([
    ['text where a number should be', withLine(5, '0.2070 many'), 'TEXT_NOT_A_NUMBER', 5, 2],
    ['a number that is none', withLine(7, '0.2110 NaN'), 'NUMBER_NOT_FINITE', 7, 2],
    ['infinity', withLine(7, '0.2110 inf'), 'NUMBER_NOT_FINITE', 7, 2],
    ['a negative count', withLine(9, '0.2150 -3'), 'COUNT_NEGATIVE', 9, 2],
    ['a bond below zero', withLine(2, '-0.2 12'), 'BOND_NOT_POSITIVE', 2, 1],
    ['bins out of order', withLine(9, '0.2010 3'), 'BINS_NOT_ASCENDING', 9, 1],
    ['a missing column', withLine(9, '0.2150'), 'COLUMN_MISSING', 9, undefined],
  ])(
    'for %s is refused with line and column, and nothing is stored',
    async (_what, file, code, line, column) => {
      const before = await Promise.all(['distribution', 'source_file'].map(rows))
      const response = await bring(file)
      expect(response.status).toBe(422)
      expect(response.body).toMatchObject({ code, line, ...(column === undefined ? {} : { column }) })
      expect(await Promise.all(['distribution', 'source_file'].map(rows))).toEqual(before)
      expect((await current()).body).toMatchObject({ id: job.distributionId })
    },
  )

  it('with decimal commas is refused with a hint', async () => {
    const text = bondFile()
      .text.replaceAll('.', ',')
      .replace(/^#.*\n/, '')
    const response = await bring({ name: 'komma.txt', text })
    expect(response.status).toBe(422)
    expect(response.body).toMatchObject({ code: 'DECIMAL_COMMA' })
  })

  it.each([
    ['an empty file', ''],
    ['comments only', '# nothing\n# here\n'],
  ])('being %s is refused', async (_what, text) => {
    const response = await bring({ name: 'empty.txt', text })
    expect(response.status).toBe(422)
    expect(response.body).toMatchObject({ code: 'FILE_EMPTY' })
  })

  it('being no text at all is refused', async () => {
    const response = await bring({
      name: 'picture.png',
      text: '\u0089PNG\r\n\u001a\n\u0000\u0000\u0000\rIHDR',
    })
    expect(response.status).toBe(422)
    expect(response.body).toMatchObject({ line: 1 })
  })

  it('over 20 MB is refused, and one of 20 MB is read', async () => {
    const tooLarge = await bring({ name: 'large.txt', text: '1'.repeat(MAX_FILE_BYTES + 1) })
    expect(tooLarge.status).toBe(413)
    expect(tooLarge.body).toMatchObject({ code: 'PAYLOAD_TOO_LARGE', field: 'file' })
    const { text } = bondFile()
    const padded = `${text}${`#${'x'.repeat(1022)}\n`.repeat(Math.floor((MAX_FILE_BYTES - text.length) / 1024))}`
    expect(Buffer.byteLength(padded)).toBeLessThanOrEqual(MAX_FILE_BYTES)
    expect((await bring({ name: 'just.txt', text: padded })).status).toBe(201)
  })
})

describe('a potential', () => {
  it('goes stale when its data are replaced or stand for another number of samples, and fresh when saved again', async () => {
    const path = `/api/terms/${job.bondId}/potential`
    const read = async () =>
      (await client.get(`${path}?statePoint=${job.statePointId}`)).body as StoredPotential
    const listed = async () => {
      const response = await client.get(`/api/mappings/${job.mappingId}/terms?statePoint=${job.statePointId}`)
      return (response.body as { terms: Term[] }).terms.find(({ id }) => id === job.bondId)?.stale
    }
    expect(await read()).toMatchObject({ id: job.potentialId, stale: false, revision: 1 })
    expect(await listed()).toBe(false)
    await client.patch(`/api/distributions/${job.distributionId}`, { independentSamples: 1000 })
    expect(await read()).toMatchObject({ stale: true })
    expect(await listed()).toBe(true)
    await client.patch(`/api/distributions/${job.distributionId}`, { independentSamples: null })
    expect(await read()).toMatchObject({ stale: false })
    await bring(bondFile('newer.txt', 4e5))
    const { settings, ...stale } = await read()
    expect(stale).toMatchObject({ stale: true, distributionId: job.distributionId })
    const saved = await client.put(path, { statePointId: job.statePointId, revision: 1, settings })
    expect(saved.body).toMatchObject({ stale: false, revision: 2, id: job.potentialId })
    expect((saved.body as StoredPotential).distributionId).not.toBe(job.distributionId)
  })

  it('is saved by exactly one of several people at the same moment', async () => {
    const { settings } = (
      await client.get(`/api/terms/${job.bondId}/potential?statePoint=${job.statePointId}`)
    ).body as StoredPotential
    const save = (rows: number, revision: number | null) =>
      client.put(`/api/terms/${job.bondId}/potential`, {
        statePointId: job.statePointId,
        revision,
        settings: { ...settings, table: { ...settings.table, rows } },
      })
    const again = await Promise.all([100, 200, 300].map((count) => save(count, 1)))
    expect(again.map(({ status }) => status).sort()).toEqual([200, 409, 409])
    const conflict = again.find(({ status }) => status === 409)?.body as { details: StoredPotential }
    expect(conflict.details.revision).toBe(2)
    expect((await client.delete(`/api/potentials/${job.potentialId}`)).status).toBe(204)
    const first = await Promise.all([100, 200, 300].map((count) => save(count, null)))
    expect(first.map(({ status }) => status).sort()).toEqual([200, 409, 409])
  })

  it('of settings that give no table is refused and leaves the saved one alone', async () => {
    const { settings } = (
      await client.get(`/api/terms/${job.bondId}/potential?statePoint=${job.statePointId}`)
    ).body as StoredPotential
    const response = await client.put(`/api/terms/${job.bondId}/potential`, {
      statePointId: job.statePointId,
      revision: 1,
      settings: { ...settings, table: { ...settings.table, low: 0.5, high: 0.1 } },
    })
    expect(response.status).toBe(422)
    expect(response.body).toMatchObject({ code: 'SETTING_INVALID' })
    const stored = await client.get(`/api/terms/${job.bondId}/potential?statePoint=${job.statePointId}`)
    expect(stored.body).toMatchObject({ revision: 1 })
  })

  it('needs data', async () => {
    const { settings } = (
      await client.get(`/api/terms/${job.bondId}/potential?statePoint=${job.statePointId}`)
    ).body as StoredPotential
    const body = { statePointId: job.statePointId, revision: null, settings }
    const response = await client.put(`/api/terms/${job.angleId}/potential`, body)
    expect(response.status).toBe(404)
    expect(response.body).toMatchObject({ code: 'NOT_FOUND' })
  })
})

async function download(path: string) {
  const response = await client
    .raw('get', path)
    .buffer(true)
    .parse((stream, done) => {
      const chunks: Buffer[] = []
      stream.on('data', (chunk: Buffer) => chunks.push(chunk))
      stream.on('end', () => done(null, Buffer.concat(chunks)))
    })
  return { agentBytes: response.body as Buffer, headers: response.headers as Record<string, unknown> }
}
