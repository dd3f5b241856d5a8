import request from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { SIGN_IN_LIMITS } from '../../server/middleware/limits'
import { ApiClient } from '../support/api-client'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, PASSWORD, type TestGroup } from '../support/group-builder'

let server: ApiServer
let group: TestGroup

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
})

afterAll(() => server.close())

const cookieOf = (response: request.Response): string => {
  const cookies = (response.headers['set-cookie'] ?? []) as unknown as string[]
  return cookies.find((cookie) => cookie.startsWith('beadwright.sid=')) ?? ''
}
const idOf = (cookie: string): string => cookie.split(';')[0]

describe('signing in', () => {
  it('answers with the person, their groups and a new token', async () => {
    const client = new ApiClient(server.app)
    const before = await client.open()
    expect(before.user).toBeNull()
    const response = await client.signIn(group.reviewer.email, PASSWORD)
    expect(response.status).toBe(200)
    expect(response.body).toMatchObject({
      user: {
        email: group.reviewer.email,
        memberships: [{ groupId: group.groupId, role: 'reviewer', demo: false }],
      },
      demoUsers: [],
    })
    expect((response.body as { csrfToken: string }).csrfToken).not.toBe(before.csrfToken)
  })

  it('takes the address in any capitals, with blanks around it', async () => {
    const response = await new ApiClient(server.app).signIn(` ${group.owner.email.toUpperCase()} `, PASSWORD)
    expect(response.status).toBe(200)
  })

  it('refuses a wrong password and an unknown address with the same words', async () => {
    const wrong = await new ApiClient(server.app).signIn(group.owner.email, 'not the password')
    const unknown = await new ApiClient(server.app).signIn('nobody@example.org', PASSWORD)
    expect([wrong.status, unknown.status]).toEqual([401, 401])
    expect(wrong.body).toMatchObject({ code: 'SIGN_IN_FAILED' })
    expect((unknown.body as { message: string }).message).toBe((wrong.body as { message: string }).message)
  })

  it('starts a new session, so that an id planted before is worth nothing', async () => {
    const planted = await request(server.app).get('/api/session')
    const cookie = idOf(cookieOf(planted))
    const { csrfToken } = planted.body as { csrfToken: string }
    const signedIn = await request(server.app)
      .post('/api/session')
      .set({ Cookie: cookie, 'X-CSRF-Token': csrfToken })
      .send({ email: group.owner.email, password: PASSWORD })
    expect(signedIn.status).toBe(200)
    expect(idOf(cookieOf(signedIn))).not.toBe(cookie)
    const withOld = await request(server.app).get('/api/session').set('Cookie', cookie)
    expect(withOld.body).toMatchObject({ user: null })
    const withNew = await request(server.app)
      .get('/api/session')
      .set('Cookie', idOf(cookieOf(signedIn)))
    expect(withNew.body).toMatchObject({ user: { email: group.owner.email } })
  })

  it('does not accept an id that somebody made up', async () => {
    const response = await request(server.app)
      .get('/api/session')
      .set('Cookie', 'beadwright.sid=s%3Amade-up.abc')
    expect(response.body).toMatchObject({ user: null })
    expect(cookieOf(response)).not.toContain('made-up')
  })

  it('needs the token of the session like every other write', async () => {
    const response = await request(server.app)
      .post('/api/session')
      .send({ email: group.owner.email, password: PASSWORD })
    expect(response.status).toBe(403)
    expect(response.body).toMatchObject({ code: 'CSRF_TOKEN_INVALID' })
  })
})

describe('the cookie', () => {
  it('is out of reach for scripts and other sites, and lives for fourteen days after sign-in', async () => {
    const cookie = cookieOf(await new ApiClient(server.app).signIn(group.owner.email, PASSWORD))
    expect(cookie).toMatch(/; HttpOnly/)
    expect(cookie).toMatch(/; SameSite=Lax/)
    expect(cookie).toMatch(/; Path=\//)
    expect(cookie).not.toMatch(/; Secure/)
    const expires = Date.parse(/Expires=([^;]+)/.exec(cookie)?.[1] ?? '')
    const days = (expires - Date.now()) / 86_400_000
    expect(days).toBeGreaterThan(13.9)
    expect(days).toBeLessThanOrEqual(14.01)
  })

  it('is renewed by every request of someone signed in', async () => {
    expect(cookieOf(await group.owner.client.get('/api/session'))).toMatch(/Expires=/)
  })

  it('is for https only where a trusted proxy says https', async () => {
    const behindProxy = await openApiServer({ trustedProxies: 1 })
    try {
      const https = await request(behindProxy.app).get('/api/session').set('X-Forwarded-Proto', 'https')
      expect(cookieOf(https)).toMatch(/; Secure/)
      const http = await request(behindProxy.app).get('/api/session').set('X-Forwarded-Proto', 'http')
      expect(cookieOf(http)).not.toMatch(/; Secure/)
    } finally {
      await behindProxy.close()
    }
    const believed = await request(server.app).get('/api/session').set('X-Forwarded-Proto', 'https')
    expect(cookieOf(believed)).not.toMatch(/; Secure/)
  })
})

describe('a write from another site', () => {
  it.each(['https://elsewhere.example', 'null', 'http://127.0.0.1.elsewhere.example'])(
    'is refused although it carries the token: %s',
    async (origin) => {
      const { client } = group.owner
      const response = await client
        .raw('post', `/api/groups/${group.groupId}/polymers`)
        .set({ Origin: origin, 'X-CSRF-Token': client.csrfToken })
        .send({ name: 'From elsewhere', smiles: '*CC*' })
      expect(response.status).toBe(403)
      expect(response.body).toMatchObject({ code: 'CSRF_TOKEN_INVALID' })
    },
  )

  it('is accepted from our own origin', async () => {
    const { client } = group.owner
    const response = await client
      .raw('post', `/api/groups/${group.groupId}/polymers`)
      .set({ Host: 'beads.example', Origin: 'https://beads.example', 'X-CSRF-Token': client.csrfToken })
      .send({ name: 'From here', smiles: '*CC*' })
    expect(response.status).toBe(201)
  })
})

describe('signing out', () => {
  it('ends the session for good', async () => {
    const client = new ApiClient(server.app)
    const cookie = idOf(cookieOf(await client.signIn(group.owner.email, PASSWORD)))
    expect((await client.delete('/api/session')).status).toBe(204)
    const replayed = await request(server.app)
      .get(`/api/groups/${group.groupId}/polymers`)
      .set('Cookie', cookie)
    expect(replayed.status).toBe(401)
  })

  it('leaves other sessions of the same person alone', async () => {
    const [one, other] = [new ApiClient(server.app), new ApiClient(server.app)]
    await one.signIn(group.owner.email, PASSWORD)
    await other.signIn(group.owner.email, PASSWORD)
    await one.delete('/api/session')
    expect((await other.open()).user).toMatchObject({ email: group.owner.email })
  })
})

describe('someone who tries passwords', () => {
  it('is stopped at one address of e-mail, also with the right password, and told how long', async () => {
    const victim = await buildGroup(server)
    for (let attempt = 0; attempt < SIGN_IN_LIMITS.perEmail; attempt++) {
      const response = await new ApiClient(server.app).signIn(victim.owner.email, `guess ${attempt}`)
      expect(response.status).toBe(401)
    }
    const stopped = await new ApiClient(server.app).signIn(victim.owner.email.toUpperCase(), PASSWORD)
    expect(stopped.status).toBe(429)
    expect(stopped.body).toMatchObject({ code: 'TOO_MANY_ATTEMPTS' })
    const wait = Number(stopped.headers['retry-after'])
    expect(wait).toBeGreaterThan(0)
    expect(wait).toBeLessThanOrEqual(900)
    expect((await new ApiClient(server.app).signIn(victim.reviewer.email, PASSWORD)).status).toBe(200)
  })

  it('is stopped at one address of the network, whatever e-mail addresses are tried', async () => {
    const other = await openApiServer({ trustedProxies: 1 })
    try {
      const attempt = async (from: string, email: string): Promise<number> => {
        const session = await request(other.app).get('/api/session')
        const response = await request(other.app)
          .post('/api/session')
          .set({ Cookie: idOf(cookieOf(session)), 'X-Forwarded-For': from })
          .set('X-CSRF-Token', (session.body as { csrfToken: string }).csrfToken)
          .send({ email, password: 'a guess' })
        return response.status
      }
      for (let count = 0; count < SIGN_IN_LIMITS.perAddress; count++) {
        expect(await attempt('192.0.2.1', `person${count}@example.org`)).toBe(401)
      }
      expect(await attempt('192.0.2.1', 'one-more@example.org')).toBe(429)
      expect(await attempt('192.0.2.2', 'one-more@example.org')).toBe(401)
    } finally {
      await other.close()
    }
  })
})

describe('passwords', () => {
  it('are kept as argon2id and nothing else', async () => {
    const rows: { hash: string }[] = await server.dataSource.query(
      'select "password_hash" as hash from "user" where "email" = $1',
      [group.owner.email],
    )
    expect(rows[0].hash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/)
  })
})
