import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest'
import { ApiClient } from '../support/api-client'
import { type ApiServer, openApiServer } from '../support/api-server'
import { PASSWORD } from '../support/group-builder'

let server: ApiServer

beforeAll(async () => {
  server = await openApiServer({ demo: true })
})

afterEach(async () => {
  await server.dataSource.query('delete from "group"')
  await server.dataSource.query('delete from "user"')
  await server.dataSource.query('delete from "set_up_link"')
})

afterAll(() => server.close())

const details = (token: string, email = 'first@example.org') => ({
  token,
  groupName: 'Soft matter',
  name: 'The first',
  email,
  password: PASSWORD,
})

async function newClient(): Promise<ApiClient> {
  const client = new ApiClient(server.app)
  await client.open()
  return client
}

async function offer(): Promise<string> {
  const token = await server.services.setUp.offer()
  if (token === null) throw new Error('No link was offered.')
  return token
}

describe('the set-up link', () => {
  it('founds the first group and signs its owner in', async () => {
    const token = await offer()
    const client = await newClient()
    expect((await client.get(`/api/set-up/${token}`)).status).toBe(204)
    const response = await client.post('/api/set-up', details(token))
    expect(response.status).toBe(201)
    expect(response.body).toMatchObject({
      user: {
        email: 'first@example.org',
        memberships: [{ groupName: 'Soft matter', role: 'owner', demo: false }],
      },
    })
    expect((await client.open()).user).toMatchObject({ name: 'The first' })
    expect((await new ApiClient(server.app).signIn('first@example.org', PASSWORD)).status).toBe(200)
  })

  it('works once', async () => {
    const token = await offer()
    await (await newClient()).post('/api/set-up', details(token))
    const again = await (await newClient()).post('/api/set-up', details(token, 'second@example.org'))
    expect(again.status).toBe(404)
    expect(again.body).toMatchObject({ code: 'SET_UP_LINK_INVALID' })
    expect((await (await newClient()).get(`/api/set-up/${token}`)).status).toBe(404)
  })

  it('lets exactly one of several people in who use it at the same moment, also by different links', async () => {
    const tokens = [await offer(), await offer()]
    const clients = await Promise.all([1, 2, 3, 4].map(newClient))
    const responses = await Promise.all(
      clients.map((client, index) =>
        client.post('/api/set-up', details(tokens[index % 2], `person${index}@example.org`)),
      ),
    )
    expect(responses.map(({ status }) => status).sort()).toEqual([201, 404, 404, 404])
    const [{ count }]: { count: number }[] = await server.dataSource.query(
      'select count(*)::int as count from "group"',
    )
    expect(count).toBe(1)
  })

  it('is not used up by details that are refused', async () => {
    const token = await offer()
    const short = await (await newClient()).post('/api/set-up', { ...details(token), password: 'short' })
    expect(short.status).toBe(400)
    expect(short.body).toMatchObject({ code: 'VALIDATION_FAILED', field: 'password' })
    expect((await (await newClient()).get(`/api/set-up/${token}`)).status).toBe(204)
  })

  it('is offered no more once an owner is in, and older links end with it', async () => {
    const [older, newer] = [await offer(), await offer()]
    await (await newClient()).post('/api/set-up', details(newer))
    expect(await server.services.setUp.offer()).toBeNull()
    expect((await (await newClient()).get(`/api/set-up/${older}`)).status).toBe(404)
  })

  it('is offered beside the demo, whose people do not count', async () => {
    await foundDemo()
    const client = await newClient()
    expect((await client.post('/api/set-up', details(await offer()))).status).toBe(201)
  })

  it('is kept as a hash only', async () => {
    const token = await offer()
    const rows = JSON.stringify(await server.dataSource.query('select * from "set_up_link"'))
    expect(rows).not.toContain(token)
    expect((await (await newClient()).get('/api/set-up/made-up')).status).toBe(404)
  })
})

async function foundDemo() {
  return server.services.groups.found({
    name: 'Invented',
    demo: true,
    people: [
      { name: 'Ada', email: 'ada@demo.example', role: 'owner', password: null },
      { name: 'Bo', email: 'bo@demo.example', role: 'reviewer', password: null },
    ],
  })
}

describe('the demo', () => {
  it('offers its people by role, and lets them in without a password', async () => {
    const [owner] = await foundDemo()
    const client = await newClient()
    const { demoUsers } = await client.open()
    expect(demoUsers.map(({ name, role }) => [name, role])).toEqual([
      ['Ada', 'owner'],
      ['Bo', 'reviewer'],
    ])
    const response = await client.post('/api/session/demo', { userId: owner.userId })
    expect(response.body).toMatchObject({ user: { name: 'Ada', memberships: [{ demo: true }] } })
  })

  it('lets nobody else in that way', async () => {
    const [real] = await server.services.groups.found({
      name: 'Real',
      demo: false,
      people: [{ name: 'Cy', email: 'cy@example.org', role: 'owner', password: PASSWORD }],
    })
    const response = await (await newClient()).post('/api/session/demo', { userId: real.userId })
    expect(response.status).toBe(404)
  })

  it('does not let its people in by a password, not even an empty one', async () => {
    await foundDemo()
    for (const password of ['null', PASSWORD]) {
      expect((await new ApiClient(server.app).signIn('ada@demo.example', password)).status).toBe(401)
    }
  })

  it('is closed when it is off: no people offered, no way in, and whoever was in is out', async () => {
    const [owner] = await foundDemo()
    const client = await newClient()
    await client.post('/api/session/demo', { userId: owner.userId })
    await server.services.sessions.endDemoSessions()
    expect((await client.open()).user).toBeNull()

    const off = await openApiServer()
    try {
      const [member] = await off.services.groups.found({
        name: 'Invented',
        demo: true,
        people: [{ name: 'Ada', email: 'ada@demo.example', role: 'owner', password: null }],
      })
      const visitor = new ApiClient(off.app)
      expect((await visitor.open()).demoUsers).toEqual([])
      expect((await visitor.post('/api/session/demo', { userId: member.userId })).status).toBe(404)
    } finally {
      await off.close()
    }
  })
})

describe('the secret that signs sessions', () => {
  it('is made once and stays the same', async () => {
    const [one, other] = await Promise.all([
      server.services.settings.sessionSecret(),
      server.services.settings.sessionSecret(),
    ])
    expect(one).toBe(other)
    expect(one.length).toBeGreaterThanOrEqual(64)
  })
})
