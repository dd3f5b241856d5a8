import { execFileSync } from 'node:child_process'
import { mkdirSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { strFromU8, unzipSync } from 'fflate'
import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Deliveries, Received } from '@shared/contracts/delivery'
import type { Written } from '@shared/contracts/delivery-writing'
import { layoutDocumentSchema } from '@shared/contracts/layout'
import { builtInLayout } from '@shared/layouts'
import { sha256 } from '../../../server/services/hashes'
import type { ApiClient } from '../../support/api-client'
import { type ApiServer, openApiServer } from '../../support/api-server'
import { buildDelivery, type Delivery, receivedToken } from '../../support/delivery-builder'
import { buildGroup, type TestGroup } from '../../support/group-builder'
import { buildReleased } from '../../support/hand-over-builder'
import { bondFile } from '../../support/job-builder'
import { mailsTo, newAddress } from '../../support/mail-texts'
import { temporaryFolder } from '../../support/temporary-folder'

let server: ApiServer
let group: TestGroup
let first: Delivery
let second: Delivery

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  first = await buildDelivery(server, group, { title: 'First' })
  const { handOver } = await buildReleased(server.services, group, { job: first.job, title: 'Second' })
  second = { ...first, handOver }
}, 90_000)

afterAll(() => server.close())

const page = async (token: string): Promise<Received> =>
  (await request(server.app).get(`/api/received/${token}`)).body as Received
const deliveriesOf = async (client: ApiClient): Promise<Deliveries> =>
  (await client.get(`/api/hand-overs/${first.handOver.id}/deliveries`)).body as Deliveries
const zipOf = async (call: request.Test): Promise<Record<string, Uint8Array>> => {
  const response = await call.buffer(true).parse((stream, done) => {
    const chunks: Buffer[] = []
    stream.on('data', (chunk: Buffer) => chunks.push(chunk))
    stream.on('end', () => done(null, Buffer.concat(chunks)))
  })
  expect(response.status).toBe(200)
  return unzipSync(response.body as Buffer)
}
const bond = 'bond_A-A_400K.txt'
const own = (changes: object = {}) => ({
  name: 'Ours',
  document: {
    ...layoutDocumentSchema.parse(
      builtInLayout('two-columns', { length: 'angstrom', angle: 'radian', energy: 'kcal/mol' }),
    ),
    ...changes,
  },
})

describe('sending a released hand-over', () => {
  it('mails each recipient a link of their own, and shows the group who has it', async () => {
    const { client } = group.owner
    const [recipient] = (await deliveriesOf(client)).recipients
    expect(recipient).toMatchObject({ email: first.email, sent: 1, state: 'waiting', hasAccount: false })
    const days = (Date.parse(recipient.expiresAt) - Date.parse(recipient.sentAt)) / 86_400_000
    expect(Math.round(days)).toBe(90)
    const [mail] = await mailsTo(server, first.email)
    expect(mail.subject).toMatch(/^Hand-over \d+ from .*: First$/)
  })

  it.each(['a@b.example\nBcc: others@example.org', 'a@b.example, c@d.example', 'nobody', ''])(
    'refuses the address %j, and sends to none of the others named with it',
    async (email) => {
      const good = newAddress()
      const recipients = [
        { name: 'Good', email: good },
        { name: 'Bad', email },
      ]
      const refused = await group.modeller.client.post(`/api/hand-overs/${first.handOver.id}/deliveries`, {
        recipients,
      })
      expect([refused.status, refused.body]).toMatchObject([400, { code: 'VALIDATION_FAILED' }])
      expect(await mailsTo(server, good)).toEqual([])
    },
  )

  it('refuses a name with a line break, nobody at all, and someone who has it', async () => {
    const send = async (recipients: object[]): Promise<unknown> =>
      (await group.modeller.client.post(`/api/hand-overs/${first.handOver.id}/deliveries`, { recipients }))
        .body
    expect(await send([{ name: 'A\nB', email: newAddress() }])).toMatchObject({ code: 'VALIDATION_FAILED' })
    expect(await send([])).toMatchObject({ code: 'VALIDATION_FAILED', field: 'recipients' })
    expect(await send([{ name: 'Again', email: first.email }])).toMatchObject({ code: 'IN_USE' })
  })

  it('says that nothing can be sent before the release', async () => {
    const { client } = group.modeller
    const { polymerId, mappingId, statePointId } = first.job
    const draft = await client.post(`/api/polymers/${polymerId}/hand-overs`, {
      mappingId,
      statePointId,
      title: 'Draft',
    })
    const { id } = draft.body as { id: string }
    const response = await client.post(`/api/hand-overs/${id}/deliveries`, {
      recipients: [{ name: 'R', email: newAddress() }],
    })
    expect(response.body).toMatchObject({ code: 'NOT_FOUND' })
  })
})

describe('the page of a recipient', () => {
  it('holds sheet, tables and files, names no one beside the recipient, and is on record once', async () => {
    const shown = await page(first.token)
    await page(first.token)
    expect(shown).toMatchObject({ via: 'link', withdrawn: null, recipient: { email: first.email } })
    expect(shown.frozen.number).toBe(first.handOver.number)
    expect(shown.tables.map(({ path }) => path)).toEqual([bond])
    expect(JSON.stringify(shown)).not.toContain(group.owner.email)
    const events: object[] = await server.dataSource.query(
      `select 1 from "event" where "action" = 'hand-over opened' and "subject_id" = $1`,
      [first.handOver.id],
    )
    expect(events).toHaveLength(1)
  })

  it('gives the files as they were released, byte for byte', async () => {
    const { archive, files } = await page(first.token)
    const got = await zipOf(request(server.app).get(`/api/received/${first.token}/archive.zip`))
    expect(Object.keys(got)).toEqual(files.map(({ path }) => path))
    for (const { path, sha256: sum } of files) expect([path, sha256(got[path])]).toEqual([path, sum])
    expect(archive.sha256).toBe(first.handOver.archive.sha256)
  })

  it.each(['two-columns', 'four-columns-comma', 'json'])(
    'gives them in the layout %s with manifest and checksums that hold',
    async (layout) => {
      const base = `/api/received/${first.token}`
      const units = 'length=angstrom&energy=kcal%2Fmol'
      const written = (await request(server.app).get(`${base}/written?layout=${layout}&${units}`))
        .body as Written
      const got = await zipOf(request(server.app).get(`${base}/archive.zip?layout=${layout}&${units}`))
      const folder = temporaryFolder()
      for (const [path, bytes] of Object.entries(got)) {
        mkdirSync(join(folder, path, '..'), { recursive: true })
        writeFileSync(join(folder, path), bytes)
      }
      execFileSync('sha256sum', ['-c', '--strict', '--quiet', 'SHA256SUMS'], { cwd: folder })
      const manifest = JSON.parse(strFromU8(got['manifest.json'])) as {
        layout: { name: string; length: string }
        files: { path: string; sha256: string }[]
      }
      expect(manifest.layout).toMatchObject({ name: written.layout, length: 'angstrom' })
      for (const { path, sha256: sum } of manifest.files) expect(sha256(got[path])).toBe(sum)
      for (const { path, sha256: sum } of written.files) expect(sha256(got[path])).toBe(sum)
      expect(strFromU8(got['README.txt'])).toContain(written.layout)
      expect(written.tables[0].written).toBe(layout === 'json' ? 'bond_A-A_400K.json' : bond)
    },
  )

  it('writes the released numbers in the house’s layout to the same file as the release', async () => {
    const base = `/api/received/${first.token}/file?path=${bond}`
    const released = await request(server.app).get(base).buffer(true)
    const again = await request(server.app).get(`${base}&layout=three-columns`).buffer(true)
    const rows = ({ body }: { body: Buffer }): string[] =>
      Buffer.from(body)
        .toString()
        .split('\n')
        .filter((line) => !line.startsWith('#'))
    expect(rows(again)).toEqual(rows(released))
    expect(rows(again).length).toBeGreaterThan(100)
  })

  it('takes a layout of the recipient’s own, and names what is wrong with one', async () => {
    const post = (rest: string, body: object): request.Test =>
      request(server.app).post(`/api/received/${first.token}/${rest}`).send(body)
    const text = await post('file', { ...own({ header: 'HEAD {{term}}\n' }), path: bond }).buffer(true)
    expect(Buffer.from(text.body as Buffer).toString()).toMatch(/^HEAD A–A\n/)
    const wrong = await post('written', own({ header: '{{unheard}}' }))
    expect([wrong.status, wrong.body]).toMatchObject([
      422,
      { code: 'TEMPLATE_FIELD_UNKNOWN', field: 'header' },
    ])
    const { document } = own()
    const many = await post('written', own({ bond: { ...document.bond, rows: 99_999 } }))
    expect(many.body).toMatchObject({ code: 'LAYOUT_INVALID', field: 'bond.rows' })
    const long = await post('written', own({ rowTemplate: '{{energy}}'.repeat(60) }))
    expect(long.body).toMatchObject({ code: 'LAYOUT_INVALID', field: 'rowTemplate' })
    const beyond = await post('written', own({ bond: { ...document.bond, low: 0.01, high: 90 } }))
    expect(beyond.body).toMatchObject({ code: 'LAYOUT_BEYOND_TABLE' })
    expect((await post('written', { ...own(), document: {} })).body).toMatchObject({
      code: 'VALIDATION_FAILED',
    })
    const large = await post('written', own({ header: 'x'.repeat(30_000) }))
    expect(large.body).toMatchObject({ code: 'VALIDATION_FAILED' })
  })

  it('offers the layouts of the group that made it, and of no other', async () => {
    const others = await buildGroup(server)
    const { document } = own()
    const make = async ({ modeller }: TestGroup): Promise<string> =>
      (await server.services.layouts.create(modeller.member, { name: 'Of the group', document })).id
    const [ours, theirs] = [await make(group), await make(others)]
    const { layouts } = await page(first.token)
    expect(layouts.map(({ id }) => id)).toContain(ours)
    expect(layouts.map(({ id }) => id)).not.toContain(theirs)
    const get = (layout: string): request.Test =>
      request(server.app).get(`/api/received/${first.token}/written?layout=${layout}`)
    expect((await get(ours)).status).toBe(200)
    expect((await get(theirs)).status).toBe(404)
  })

  it('lets the group see who took which file in which layout', async () => {
    const { downloads } = await deliveriesOf(group.reviewer.client)
    expect(downloads.map(({ layout }) => layout)).toEqual(
      expect.arrayContaining(['Two columns', 'JSON', 'Ours']),
    )
    expect(downloads.map(({ file }) => file)).toContain(bond)
    for (const { recipient, via } of downloads) expect([recipient, via]).toEqual(['Rhea Recipient', 'link'])
  })
})

describe('receipt, questions, and files sent back', () => {
  const post = (rest: string, body: object): request.Test =>
    request(server.app).post(`/api/received/${first.token}/${rest}`).send(body)

  it('acknowledges receipt once, and tells author and owner', async () => {
    const done = await post('acknowledgement', { name: 'Rhea Recipient' })
    expect((done.body as Received).acknowledged).toMatchObject({ by: 'Rhea Recipient' })
    expect((await post('acknowledgement', { name: 'Other' })).body).toMatchObject({ code: 'CONFLICT' })
    for (const { email } of [group.owner, group.modeller]) {
      const subjects = (await mailsTo(server, email)).map(({ subject }) => subject)
      expect(subjects.filter((subject) => subject.includes('has received'))).toHaveLength(1)
    }
  })

  it('shows question and answer to every recipient, without the name or address of whoever asked', async () => {
    const other = newAddress()
    await server.services.recipients.send(group.modeller.member, first.handOver.id, {
      recipients: [{ name: 'Otto Other', email: other }],
      earlier: false,
      days: 30,
      message: '',
    })
    const asked = await post('questions', { table: 'A–A', text: 'Does the table start at 0?' })
    const [question] = (asked.body as Received).questions
    expect(question).toMatchObject({ own: true, askedBy: 'Rhea Recipient', answer: null })
    const waiting = await group.modeller.client.get(`/api/groups/${group.groupId}/waiting`)
    expect(waiting.body).toMatchObject({ questions: [{ id: question.id, table: 'A–A' }] })
    const answer = (text: string) =>
      group.modeller.client.post(`/api/questions/${question.id}/answer`, { text })
    expect((await answer('At the first bin.')).status).toBe(201)
    expect((await answer('Elsewhere.')).body).toMatchObject({ code: 'CONFLICT' })
    const seen = await page(await receivedToken(server, other))
    expect(seen.questions).toMatchObject([
      {
        own: false,
        askedBy: null,
        text: 'Does the table start at 0?',
        answer: { text: 'At the first bin.' },
      },
    ])
    for (const secret of ['Rhea Recipient', first.email]) expect(JSON.stringify(seen)).not.toContain(secret)
    const [mail] = await mailsTo(server, first.email)
    expect(mail.text).toContain('At the first bin.')
    expect(await mailsTo(server, other)).toHaveLength(1)
    const nowhere = await post('questions', { table: 'B–B', text: 'Is it here?' })
    expect(nowhere.body).toMatchObject({ code: 'NOT_FOUND', field: 'table' })
  })

  it('keeps a file that can be read, and refuses one that cannot with line and column', async () => {
    const send = (text: string): request.Test =>
      request(server.app)
        .post(`/api/received/${first.token}/returned-files`)
        .field('settings', JSON.stringify({ table: 'A–A', note: 'Run of 10 ns' }))
        .attach('file', Buffer.from(text), '../measured.txt')
    const bad = await send('# r n\n0.1 5\n0.2 six\n0.3 7\n')
    expect([bad.status, bad.body]).toMatchObject([422, { line: 3 }])
    const { text } = bondFile()
    const good = await send(text)
    expect((good.body as Received).returned).toMatchObject([{ name: 'measured.txt', standing: 'new' }])
    const { client } = group.modeller
    const waiting = await client.get(`/api/groups/${group.groupId}/waiting`)
    expect(waiting.body).toMatchObject({ returned: [{ name: 'measured.txt' }] })
    const [file] = (await deliveriesOf(client)).returned
    expect(file).toMatchObject({ sha256: sha256(text), sentBy: 'Rhea Recipient', note: 'Run of 10 ns' })
    const back = await client.get(`/api/returned-files/${file.id}/file`)
    expect(Buffer.from(back.body as Buffer).toString()).toBe(text)
    const others = await server.services.recipients.list(group.owner.member, first.handOver.id)
    const other = others.recipients.find(({ email }) => email !== first.email)
    const seen = await page(await receivedToken(server, other?.email ?? ''))
    expect(seen.returned).toEqual([])
    const settled = await client.put(`/api/returned-files/${file.id}`, { standing: 'set aside' })
    expect((settled.body as Deliveries).returned).toMatchObject([{ standing: 'set aside' }])
  })
})

describe('a later hand-over, and a withdrawal', () => {
  it('goes to the earlier recipients in one step; the earlier page says which one replaces it', async () => {
    const { client } = group.modeller
    const path = `/api/hand-overs/${second.handOver.id}/deliveries`
    const before = (await client.get(path)).body as Deliveries
    expect(before.earlier.map(({ email }) => email)).toContain(first.email)
    expect((await page(first.token)).replacedBy).toMatchObject({
      number: second.handOver.number,
      sent: false,
    })
    const sent = await client.post(path, { recipients: [], earlier: true })
    expect((sent.body as Deliveries).recipients).toHaveLength(before.earlier.length)
    expect((sent.body as Deliveries).earlier).toEqual([])
    expect((await page(first.token)).replacedBy).toMatchObject({ sent: true, id: null })
    const [mail] = await mailsTo(server, first.email)
    expect(mail.subject).toContain(`replaces hand-over ${first.handOver.number}`)
    const now = await page(await receivedToken(server, first.email))
    expect(now.frozen.replaces).toBe(first.handOver.number)
    expect(now.frozen.differences.length).toBeGreaterThan(0)
  })

  it('tells every recipient of a withdrawal why, and the page says so', async () => {
    const reason = 'The bond was measured at 300 K.'
    const { id } = first.handOver
    const { revision } = (await group.owner.client.get(`/api/hand-overs/${id}`)).body as { revision: number }
    const done = await group.owner.client.post(`/api/hand-overs/${id}/withdrawal`, { revision, reason })
    expect(done.status).toBe(200)
    const mails = await mailsTo(server, first.email)
    expect(
      mails.filter(({ subject, text }) => subject.startsWith('Withdrawn') && text.includes(reason)),
    ).toHaveLength(1)
    expect((await page(first.token)).withdrawn).toMatchObject({ reason })
    const base = `/api/received/${first.token}`
    const single = await request(server.app).get(`${base}/file?path=${bond}`)
    expect([single.status, single.body]).toMatchObject([409, { code: 'HAND_OVER_WITHDRAWN' }])
    for (const query of ['', '?layout=json']) {
      const kept = await zipOf(request(server.app).get(`${base}/archive.zip${query}`))
      expect(strFromU8(kept['WITHDRAWN.txt'])).toContain(reason)
      expect(JSON.parse(strFromU8(kept['manifest.json']))).toMatchObject({ standing: 'withdrawn' })
    }
    const more = await group.modeller.client.post(`/api/hand-overs/${id}/deliveries`, {
      recipients: [{ name: 'Late', email: newAddress() }],
    })
    expect(more.body).toMatchObject({ code: 'HAND_OVER_WITHDRAWN' })
  })
})
