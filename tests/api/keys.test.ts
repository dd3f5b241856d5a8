import request, { type Response } from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type ApiKey, type ApiKeyMade, MAX_KEYS } from '@shared/contracts/key'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import { KeyClient, scriptOf } from '../support/key-client'

let server: ApiServer
let group: TestGroup
let polymers: string

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  polymers = `/api/groups/${group.groupId}/polymers`
})

afterAll(() => server.close())

const make = async (changes: object = {}, person = group.modeller): Promise<Response> =>
  person.client.post('/api/keys', { name: 'upload', scopes: ['read'], expiresAt: null, ...changes })
const madeBy = async (changes: object = {}): Promise<ApiKeyMade> => (await make(changes)).body as ApiKeyMade
const asked = (key: string): Promise<Response> => new KeyClient(server.app, key).send('get', polymers)

describe('making a key', () => {
  it('shows it once: what is kept is its hash and how it begins', async () => {
    const response = await make({ name: 'nightly', scopes: ['read', 'write'] })
    expect(response.status).toBe(201)
    const { key, made } = response.body as ApiKeyMade
    expect(key).toMatch(/^bw_[\w-]{51}$/)
    expect(made).toMatchObject({ name: 'nightly', scopes: ['read', 'write'], prefix: key.slice(0, 11) })
    const rows: unknown[] = await server.dataSource.query('select * from "api_key"')
    expect(JSON.stringify(rows)).not.toContain(key)
    expect(JSON.stringify(rows)).not.toContain(key.slice(11))
    const list = await group.modeller.client.get('/api/keys')
    expect(list.text).not.toContain(key)
    expect(list.body).toMatchObject({ keys: expect.arrayContaining([made]) as unknown })
    expect(server.log()).not.toContain(key)
  })

  it('gives every key another secret', async () => {
    const keys = await Promise.all([madeBy(), madeBy(), madeBy()])
    expect(new Set(keys.map(({ key }) => key.slice(11))).size).toBe(3)
  })

  it.each([
    [{ name: ' ' }, 'name'],
    [{ scopes: [] }, 'scopes'],
    [{ scopes: ['manage'] }, 'scopes.0'],
    [{ scopes: ['read', 'read'] }, 'scopes'],
    [{ expiresAt: '2020-01-01T00:00:00.000Z' }, 'expiresAt'],
    [{ expiresAt: 'tomorrow' }, 'expiresAt'],
  ])('refuses %j', async (changes, field) => {
    const response = await make(changes)
    expect(response.status).toBe(400)
    expect(response.body).toMatchObject({ code: 'VALIDATION_FAILED', field })
  })

  it('stops at a number that one person can look after, also when asked at the same moment', async () => {
    const person = group.collaborator
    const answers = await Promise.all(Array.from({ length: MAX_KEYS + 3 }, () => make({}, person)))
    expect(answers.filter(({ status }) => status === 201)).toHaveLength(MAX_KEYS)
    const refused = answers.filter(({ status }) => status === 409)
    expect(refused).toHaveLength(3)
    expect(refused[0].body).toMatchObject({ code: 'TOO_MANY_KEYS' })
  })

  it('and revoking it stand in the history of the group, without the secret', async () => {
    const { key, made } = await madeBy({ name: 'for the record' })
    await group.modeller.client.delete(`/api/keys/${made.id}`)
    const rows: { action: string; details: object }[] = await server.dataSource.query(
      'select "action", "details" from "event" where "group_id" = $1 and "subject_id" = $2 order by "id"',
      [group.groupId, made.id],
    )
    expect(rows.map(({ action }) => action)).toEqual(['key made', 'key revoked'])
    expect(rows[0].details).toEqual({ prefix: made.prefix, scopes: 'read', expires: null })
    expect(JSON.stringify(rows)).not.toContain(key)
  })
})

describe('a key', () => {
  it('says for whom it acts and where', async () => {
    const script = await scriptOf(server, group.reviewer.member.userId, ['hand-overs'], 'release')
    const response = await script.send('get', '/api/key')
    expect(response.status).toBe(200)
    expect(response.body).toMatchObject({
      key: { name: 'release', scopes: ['hand-overs'] },
      person: { name: 'The reviewer', memberships: [{ groupId: group.groupId, role: 'reviewer' }] },
    })
  })

  it('needs no token of a session, is named in the history, and remembers when it was used', async () => {
    const { key, made } = await madeBy({ scopes: ['write'] })
    const script = new KeyClient(server.app, key)
    const response = await script.send('post', polymers, { name: 'By a script', smiles: '*CC*' })
    expect(response.status, response.text).toBe(201)
    const { id } = response.body as { id: string }
    const events: object[] = await server.dataSource.query(
      'select "user_id" as "userId", "by" from "event" where "subject_id" = $1',
      [id],
    )
    expect(events).toEqual([{ userId: group.modeller.member.userId, by: 'upload' }])
    const list = (await group.modeller.client.get('/api/keys')).body as { keys: ApiKey[] }
    const lastUsedAt = list.keys.find(({ id }) => id === made.id)?.lastUsedAt
    expect(Math.abs(Date.parse(lastUsedAt ?? '') - Date.now())).toBeLessThan(60_000)
  })

  it('decides alone: a cookie that comes with it counts for nothing', async () => {
    const { key } = await madeBy({ scopes: ['read'] })
    const { client } = group.owner
    const write = client.raw('post', polymers).set('X-CSRF-Token', client.csrfToken)
    const response = await write.set('Authorization', `Bearer ${key}`).send({ name: 'x', smiles: '*CC*' })
    expect(response.body).toMatchObject({ code: 'KEY_SCOPE_MISSING' })
    const wrong = await client.raw('get', polymers).set('Authorization', 'Bearer bw_wrong')
    expect(wrong.body).toMatchObject({ code: 'KEY_INVALID' })
  })

  it.each(['', 'bw_', 'bw_wrong', 'x'.repeat(5000), 'null'])(
    'that was never made is refused: %.20s',
    async (key) => {
      const response = await asked(key)
      expect(response.status).toBe(401)
      expect(response.body).toMatchObject({ code: 'KEY_INVALID' })
      expect(response.headers['www-authenticate']).toContain('invalid_token')
    },
  )

  it('is refused once it is out of date', async () => {
    const { key, made } = await madeBy({ expiresAt: new Date(Date.now() + 60_000).toISOString() })
    expect((await asked(key)).status).toBe(200)
    await server.dataSource.query(`update "api_key" set "expires_at" = now() where "id" = $1`, [made.id])
    const response = await asked(key)
    expect(response.status).toBe(401)
    expect(response.body).toMatchObject({ code: 'KEY_EXPIRED' })
  })

  it('is refused from the moment it is revoked, and is revoked by nobody else', async () => {
    const { key, made } = await madeBy()
    expect((await group.owner.client.delete(`/api/keys/${made.id}`)).status).toBe(404)
    expect((await asked(key)).status).toBe(200)
    expect((await group.modeller.client.delete(`/api/keys/${made.id}`)).status).toBe(204)
    const response = await asked(key)
    expect(response.status).toBe(401)
    expect(response.body).toMatchObject({ code: 'KEY_REVOKED' })
    expect((await group.modeller.client.delete(`/api/keys/${made.id}`)).status).toBe(404)
    expect((await group.modeller.client.delete('/api/keys/7')).status).toBe(404)
  })

  it('reaches a group no longer than its person does', async () => {
    const other = await buildGroup(server)
    const script = await scriptOf(server, other.modeller.member.userId, ['read', 'write'])
    const path = `/api/groups/${other.groupId}/polymers`
    expect((await script.send('get', path)).status).toBe(200)
    const mine = [other.groupId, other.modeller.member.userId]
    await server.dataSource.query(
      `update "membership" set "role" = 'reviewer' where "group_id" = $1 and "user_id" = $2`,
      mine,
    )
    const write = await script.send('post', path, { name: 'x', smiles: '*CC*' })
    expect(write.body).toMatchObject({ code: 'FORBIDDEN' })
    await server.dataSource.query(`delete from "membership" where "group_id" = $1 and "user_id" = $2`, mine)
    expect((await script.send('get', path)).status).toBe(404)
  })

  it('is asked for where only scripts have business', async () => {
    expect((await request(server.app).get('/api/key')).status).toBe(401)
    expect((await group.owner.client.get('/api/key')).body).toMatchObject({ code: 'NOT_SIGNED_IN' })
  })

  it('is not looked for in what a proxy asks of browsers', async () => {
    const { client } = group.owner
    const response = await client.raw('get', polymers).set('Authorization', 'Basic cHJveHk6cGFzcw==')
    expect(response.status).toBe(200)
  })

  it('of one of the demo’s people works only while the demo is on', async () => {
    const demo = await buildGroup(server, { demo: true })
    const script = await scriptOf(server, demo.owner.member.userId, ['read'])
    const response = await script.send('get', `/api/groups/${demo.groupId}/polymers`)
    expect(response.status).toBe(401)
    expect(response.body).toMatchObject({ code: 'KEY_INVALID' })
  })
})
