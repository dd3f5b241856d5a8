import { strFromU8, unzipSync } from 'fflate'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import {
  layoutDocumentSchema,
  type LayoutList,
  type LayoutPreview,
  type StoredLayout,
} from '@shared/contracts/layout'
import { readLayoutFile } from '@shared/documents'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import type { ApiClient } from '../support/api-client'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import { buildJob, type Job } from '../support/job-builder'
import { type LayoutChanges, layoutWith } from '../support/layout-builder'

let server: ApiServer
let group: TestGroup
let modeller: ApiClient
let reviewer: ApiClient
let job: Job

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  modeller = group.modeller.client
  reviewer = group.reviewer.client
  job = await buildJob(server.services, group.modeller.member)
})

afterAll(() => server.close())

const documentOf = (changes: LayoutChanges = {}) => layoutDocumentSchema.parse(layoutWith(changes))
const groupPath = () => `/api/groups/${group.owner.member.groupId}`

async function added(name: string, changes: LayoutChanges = {}): Promise<StoredLayout> {
  const response = await modeller.post(`${groupPath()}/layouts`, { name, document: documentOf(changes) })
  expect(response.status, response.text).toBe(201)
  return response.body as StoredLayout
}

const list = async (): Promise<LayoutList> =>
  (await reviewer.get(`${groupPath()}/layouts`)).body as LayoutList

describe('layouts of a group', () => {
  it('begin with those of the house, three columns by default', async () => {
    const { builtIns, default: byDefault } = await list()
    expect(builtIns.map(({ key }) => key)).toContain('json')
    expect(byDefault).toBe('three-columns')
  })

  it('get a new version with each save, and keep the older ones as they were', async () => {
    const first = await added('Versions')
    const save = { version: 1, name: 'Versions, tabs', document: documentOf({ separator: 'tab' }) }
    const second = await modeller.put(`/api/layouts/${first.id}`, save)
    expect(second.body).toMatchObject({ version: 2, name: 'Versions, tabs', newestVersion: 2 })
    const older = await reviewer.get(`/api/layouts/${first.id}?version=1`)
    expect(older.body).toMatchObject({
      version: 1,
      name: 'Versions',
      newestVersion: 2,
      document: first.document,
    })
    const versions = await reviewer.get(`/api/layouts/${first.id}/versions`)
    expect(
      (versions.body as { versions: { version: number }[] }).versions.map(({ version }) => version),
    ).toEqual([2, 1])
    expect((await reviewer.get(`/api/layouts/${first.id}?version=3`)).status).toBe(404)
  })

  it('are not saved over what someone else saved in between', async () => {
    const { id } = await added('Contested')
    const save = { version: 1, name: 'Contested', document: documentOf() }
    expect((await modeller.put(`/api/layouts/${id}`, save)).status).toBe(200)
    const late = await modeller.put(`/api/layouts/${id}`, {
      ...save,
      document: documentOf({ separator: 'comma' }),
    })
    expect(late.status).toBe(409)
    expect(late.body).toMatchObject({ code: 'CONFLICT', details: { version: 2 } })
  })

  it('have names of their own', async () => {
    await added('Taken')
    const again = await modeller.post(`${groupPath()}/layouts`, { name: 'Taken', document: documentOf() })
    expect(again.body).toMatchObject({ code: 'NAME_TAKEN', field: 'name' })
  })

  it('are refused with the line when a template has an unknown field', async () => {
    const response = await modeller.post(`${groupPath()}/layouts`, {
      name: 'Wrong',
      document: documentOf({ header: 'one\n{{temprature}}' }),
    })
    expect(response.status).toBe(422)
    expect(response.body).toMatchObject({ code: 'TEMPLATE_FIELD_UNKNOWN', field: 'header', line: 2 })
  })

  it('can be copied, archived and restored; an archived default is none', async () => {
    const { id } = await added('Old')
    const copy = await modeller.post(`/api/layouts/${id}/copy`, { name: 'Old, again' })
    expect(copy.body).toMatchObject({ name: 'Old, again', version: 1 })
    expect(
      (await group.owner.client.put(`${groupPath()}/default-layout`, { layout: id })).body,
    ).toMatchObject({ default: id })
    expect((await modeller.post(`/api/layouts/${id}/archive`, {})).body).toMatchObject({ archived: true })
    expect((await list()).default).toBe('three-columns')
    const refused = await group.owner.client.put(`${groupPath()}/default-layout`, { layout: id })
    expect(refused.status).toBe(404)
    expect((await modeller.post(`/api/layouts/${id}/restore`, {})).body).toMatchObject({ archived: false })
  })

  it('go to another group as a file', async () => {
    const { id, document } = await added('Travels', { separator: 'semicolon' })
    const file = await reviewer.get(`/api/layouts/${id}/file`)
    expect(file.headers['content-disposition']).toContain('Travels.layout.json')
    expect(readLayoutFile(file.text)).toEqual({ ok: true, name: 'Travels', layout: document })
  })

  it('leave a line in the history for every change', async () => {
    const { id } = await added('Traced')
    await modeller.put(`/api/layouts/${id}`, { version: 1, name: 'Traced', document: documentOf() })
    await modeller.post(`/api/layouts/${id}/archive`, {})
    await modeller.post(`/api/layouts/${id}/restore`, {})
    const rows: { action: string }[] = await server.dataSource.query(
      'select "action" from "event" where "subject_id" = $1 order by "id"',
      [id],
    )
    expect(rows.map(({ action }) => action)).toEqual([
      'layout added',
      'layout changed',
      'layout archived',
      'layout restored',
    ])
  })
})

describe('tables in a layout', () => {
  const table = (query: string) =>
    reviewer.get(`/api/terms/${job.bondId}/table?statePoint=${job.statePointId}&${query}`)

  beforeAll(async () => {
    const body = { statePointId: job.statePointId, revision: null, settings: DEFAULT_INVERSION_SETTINGS }
    await modeller.put(`/api/terms/${job.bondId}/potential`, body)
  })

  it('are as ever without one', async () => {
    const plain = await reviewer.get(`/api/terms/${job.bondId}/table?statePoint=${job.statePointId}`)
    expect(plain.text).toBe((await table('layout=three-columns')).text)
  })

  it('are written in one of the house, in the units asked for', async () => {
    const { text, headers } = await table('layout=json&length=angstrom')
    expect(headers['content-disposition']).toMatch(/\.json/)
    expect(JSON.parse(text)).toMatchObject({ kind: 'bond', units: { coordinate: 'angstrom' } })
  })

  it('are written in one of the group, in an older version too, and in one that was archived', async () => {
    const { id } = await added('For tables', { separator: 'comma', header: 'v1 {{term}}' })
    const second = { version: 1, name: 'For tables', document: documentOf({ header: 'v2 {{rows}}' }) }
    await modeller.put(`/api/layouts/${id}`, second)
    await modeller.post(`/api/layouts/${id}/archive`, {})
    expect((await table(`layout=${id}`)).text).toMatch(/^v2 1000\n/)
    expect((await table(`layout=${id}&layoutVersion=1`)).text).toMatch(/^v1 .+\n *\S+, *\S+/)
    expect((await table(`layout=${id}&layoutVersion=9`)).status).toBe(404)
  })

  it('reach beyond the saved table where the layout asks for it', async () => {
    const { id } = await added('Wide', { bond: { low: 0.01, high: 2, rows: 200 } })
    const rows = (await table(`layout=${id}`)).text
      .split('\n')
      .filter((line) => line !== '' && !line.startsWith('#'))
    expect(rows).toHaveLength(200)
    expect(rows.at(-1)!.trim().split(/ +/)[0]).toBe('2')
  })

  it('are refused where the layout does not fit, with the field', async () => {
    const { id } = await added('Unfit', { bond: { low: -1 } })
    const response = await table(`layout=${id}`)
    expect(response.status).toBe(422)
    expect(response.body).toMatchObject({ code: 'LAYOUT_INVALID', field: 'bond.low' })
  })

  it('fill the archive, whose README says what the columns are', async () => {
    const { id } = await added('Archive', {
      columns: ['energy', 'coordinate'],
      angle: { reading: 'supplement' },
    })
    const response = await reviewer
      .raw('get', `/api/mappings/${job.mappingId}/tables.zip?statePoint=${job.statePointId}&layout=${id}`)
      .buffer(true)
      .parse((stream, done) => {
        const chunks: Buffer[] = []
        stream.on('data', (chunk: Buffer) => chunks.push(chunk))
        stream.on('end', () => done(null, Buffer.concat(chunks)))
      })
    const files = unzipSync(response.body as Buffer)
    expect(strFromU8(files['README.txt'])).toContain('Layout: Archive, version 1')
    expect(strFromU8(files['README.txt'])).toContain('The columns are energy, coordinate')
  })

  it('take no layout of another group', async () => {
    const other = await buildGroup(server)
    const document = documentOf()
    const theirs = await other.modeller.client.post(`/api/groups/${other.owner.member.groupId}/layouts`, {
      name: 'Theirs',
      document,
    })
    expect((await table(`layout=${(theirs.body as StoredLayout).id}`)).status).toBe(404)
  })
})

describe('the preview of a layout', () => {
  it('can be made of any saved potential of the group', async () => {
    const response = await reviewer.get(`${groupPath()}/layout-examples`)
    expect(response.body).toMatchObject({
      examples: expect.arrayContaining([
        expect.objectContaining({ termId: job.bondId, statePointId: job.statePointId, kind: 'bond' }),
      ]) as unknown,
    })
  })

  const preview = (changes: LayoutChanges) =>
    reviewer.post(`/api/terms/${job.bondId}/layout-preview`, {
      statePointId: job.statePointId,
      document: documentOf(changes),
    })

  it('is the beginning and the end of the very file, with checks', async () => {
    const changes: LayoutChanges = { header: '{{term}} {{rows}}', footer: 'end' }
    const { id } = await added('Previewed', changes)
    const file = await reviewer.get(
      `/api/terms/${job.bondId}/table?statePoint=${job.statePointId}&layout=${id}`,
    )
    const lines = file.text.split('\n').slice(0, -1)
    const shown = (await preview(changes)).body as LayoutPreview
    expect(shown.lines).toBe(lines.length)
    expect(shown.head).toEqual(lines.slice(0, shown.head.length))
    expect(shown.tail).toEqual(lines.slice(-shown.tail.length))
    expect(shown.checks.filter(({ ok }) => !ok)).toEqual([])
    expect(shown.checks.map(({ code }) => code)).toContain('FORCE_SUM')
  })

  it('names what is wrong with a template', async () => {
    const response = await preview({ footer: '{{#bond}}' })
    expect(response.status).toBe(422)
    expect(response.body).toMatchObject({ code: 'TEMPLATE_INVALID', field: 'footer', line: 1 })
  })
})
