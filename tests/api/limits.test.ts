import request, { type Response } from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { LINK_LIMITS, SIGN_IN_LIMITS } from '../../server/middleware/limits'
import { ApiClient } from '../support/api-client'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, PASSWORD, type TestGroup } from '../support/group-builder'

let one: ApiServer
/** A second server process on the same database. */
let other: ApiServer
let group: TestGroup

beforeAll(async () => {
  one = await openApiServer({ trustedProxies: 1 })
  other = await openApiServer({ trustedProxies: 1, databaseUrl: one.databaseUrl })
  group = await buildGroup(one)
})

afterAll(async () => {
  await other.close()
  await one.close()
})

const signIn = (server: ApiServer, email: string, password: string): Promise<Response> =>
  new ApiClient(server.app).signIn(email, password)
const askForLink = async (server: ApiServer, from: string, token: string): Promise<Response> =>
  request(server.app).get(`/api/set-up/${token}`).set('X-Forwarded-For', from)
const attempts = async (): Promise<number> => {
  const rows: { count: number }[] = await one.dataSource.query('select count(*)::int as count from "attempt"')
  return rows[0].count
}

describe('limits', () => {
  it('of passwords hold across server processes', async () => {
    const { email } = group.owner
    for (let attempt = 0; attempt < SIGN_IN_LIMITS.perEmail; attempt++) {
      const response = await signIn(attempt % 2 === 0 ? one : other, email, `guess ${attempt}`)
      expect(response.status).toBe(401)
    }
    for (const server of [one, other]) {
      const stopped = await signIn(server, email, PASSWORD)
      expect(stopped.status).toBe(429)
      expect(stopped.body).toMatchObject({ code: 'TOO_MANY_ATTEMPTS' })
      expect(Number(stopped.headers['retry-after'])).toBeGreaterThan(0)
    }
  })

  it('do not count who gets in', async () => {
    for (let time = 0; time < SIGN_IN_LIMITS.perEmail + 2; time++) {
      expect((await signIn(time % 2 === 0 ? one : other, group.reviewer.email, PASSWORD)).status).toBe(200)
    }
  })

  it('let no more guesses through when they come all at once', async () => {
    const guesses = Array.from({ length: SIGN_IN_LIMITS.perEmail + 10 }, (_, guess) =>
      signIn(guess % 2 === 0 ? one : other, group.modeller.email, `guess ${guess}`),
    )
    const statuses = (await Promise.all(guesses)).map(({ status }) => status)
    expect(statuses.filter((status) => status === 401)).toHaveLength(SIGN_IN_LIMITS.perEmail)
    expect(statuses.filter((status) => status === 429)).toHaveLength(10)
  })

  it('of links stop who guesses at one address of the network, and nobody elsewhere', async () => {
    for (let guess = 0; guess < LINK_LIMITS.perAddress; guess++) {
      const response = await askForLink(guess % 2 === 0 ? one : other, '192.0.2.7', `guess-${guess}`)
      expect(response.body).toMatchObject({ code: 'SET_UP_LINK_INVALID' })
    }
    const stopped = await askForLink(other, '192.0.2.7', 'one-more')
    expect(stopped.status).toBe(429)
    expect(stopped.body).toMatchObject({ code: 'TOO_MANY_ATTEMPTS' })
    expect((await askForLink(one, '192.0.2.8', 'one-more')).status).toBe(404)
  })

  it('of links count the neighbours within one network of IPv6 as one', async () => {
    for (let guess = 0; guess < LINK_LIMITS.perAddress; guess++) {
      await askForLink(one, `2001:db8:0:7::${guess.toString(16)}`, `guess-${guess}`)
    }
    expect((await askForLink(one, '2001:db8:0:7:8::1', 'one-more')).status).toBe(429)
  })

  it('keep no address of e-mail or network in the database', async () => {
    const rows: object[] = await one.dataSource.query('select * from "attempt"')
    expect(rows.length).toBeGreaterThan(0)
    expect(JSON.stringify(rows)).not.toMatch(/@|192\.0\.2|2001:db8/)
  })

  it('end with their window, and what is over is cleared away', async () => {
    await one.dataSource.query(`update "attempt" set "ends_at" = now() - interval '1 second'`)
    expect((await signIn(one, group.owner.email, PASSWORD)).status).toBe(200)
    // What is left are the two counts of this sign-in itself.
    expect(await attempts()).toBe(2)
  })

  it('let nobody pass while they cannot be counted, not even with the right password', async () => {
    const client = new ApiClient(one.app)
    await client.open()
    await one.dataSource.query('alter table "attempt" rename to "attempt_away"')
    try {
      const credentials = { email: group.collaborator.email, password: PASSWORD }
      const response = await client.post('/api/session', credentials)
      expect(response.status).toBe(503)
      expect(response.body).toMatchObject({ code: 'UNAVAILABLE' })
      expect((await askForLink(one, '192.0.2.9', 'any')).status).toBe(503)
      expect((await client.open()).user).toBeNull()
    } finally {
      await one.dataSource.query('alter table "attempt_away" rename to "attempt"')
    }
    expect((await signIn(one, group.collaborator.email, PASSWORD)).status).toBe(200)
  })
})
