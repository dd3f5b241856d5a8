import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { ApiClient } from '../../support/api-client'
import { type ApiServer, openApiServer } from '../../support/api-server'
import { buildGroup, PASSWORD, type TestGroup } from '../../support/group-builder'
import { latestToken, mailsTo, newAddress } from '../../support/mail-texts'

const OTHER = 'another password for tests'

let server: ApiServer
let group: TestGroup

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
})

afterAll(() => server.close())

async function visitor(): Promise<ApiClient> {
  const client = new ApiClient(server.app)
  await client.open()
  return client
}

/** Asks as someone at an address of their own, since requests for mails are limited by it. */
const ask = async (email: string) => (await visitor()).post('/api/password-resets', { email })

const status = async (email: string, password: string): Promise<number> =>
  (await new ApiClient(server.app).signIn(email, password)).status

describe('a forgotten password', () => {
  it('is replaced by a link that works once and signs out every browser', async () => {
    const { email, client: browser } = group.modeller
    const second = new ApiClient(server.app)
    await second.signIn(email, PASSWORD)
    expect((await ask(email.toUpperCase())).status).toBe(204)
    const token = await latestToken(server, email, 'reset')
    const client = await visitor()
    expect((await client.get(`/api/password-resets/${token}`)).status).toBe(204)
    expect((await client.post(`/api/password-resets/${token}`, { password: OTHER })).status).toBe(204)

    for (const each of [browser, second]) expect((await each.open()).user).toBeNull()
    expect([await status(email, PASSWORD), await status(email, OTHER)]).toEqual([401, 200])
    const again = await client.post(`/api/password-resets/${token}`, { password: PASSWORD })
    expect([again.status, again.body]).toMatchObject([404, { code: 'LINK_INVALID' }])
    expect((await mailsTo(server, email))[0].subject).toBe('Your password was changed')
  })

  it('takes its other links with it once one is used', async () => {
    const { email } = group.reviewer
    await ask(email)
    const first = await latestToken(server, email, 'reset')
    await ask(email)
    const second = await latestToken(server, email, 'reset')
    const client = await visitor()
    expect((await client.post(`/api/password-resets/${second}`, { password: OTHER })).status).toBe(204)
    expect((await client.get(`/api/password-resets/${first}`)).status).toBe(404)
  })

  it('is not replaced by a link after an hour', async () => {
    const { email } = group.collaborator
    await ask(email)
    const token = await latestToken(server, email, 'reset')
    const [{ minutes }]: { minutes: number }[] = await server.dataSource.query(
      `select extract(epoch from "expires_at" - now())::float / 60 as minutes from "password_reset"`,
    )
    expect(minutes).toBeCloseTo(60, 0)
    await server.dataSource.query(`update "password_reset" set "expires_at" = now()`)
    const client = await visitor()
    expect((await client.get(`/api/password-resets/${token}`)).status).toBe(404)
    expect((await client.post(`/api/password-resets/${token}`, { password: OTHER })).status).toBe(404)
    expect(await status(email, PASSWORD)).toBe(200)
  })

  it('does not tell whether an address is known: the same answer, and no sooner', async () => {
    const unknown = newAddress()
    const times: number[] = []
    for (const email of [unknown, group.owner.email]) {
      const before = performance.now()
      const response = await ask(email)
      times.push(performance.now() - before)
      expect([response.status, response.text]).toEqual([204, ''])
    }
    expect(await mailsTo(server, unknown)).toEqual([])
    for (const time of times) expect(time).toBeGreaterThan(245)
  })

  it('keeps its rule for passwords, and the link for another try', async () => {
    const fresh = await buildGroup(server)
    await ask(fresh.owner.email)
    const token = await latestToken(server, fresh.owner.email, 'reset')
    const client = await visitor()
    const short = await client.post(`/api/password-resets/${token}`, { password: 'short' })
    expect([short.status, short.body]).toMatchObject([400, { field: 'password' }])
    expect((await client.get(`/api/password-resets/${token}`)).status).toBe(204)
  })
})

describe('an account', () => {
  it('takes another name', async () => {
    const fresh = await buildGroup(server)
    const response = await fresh.modeller.client.patch('/api/account', { name: '  Ada Lovelace ' })
    expect(response.body).toMatchObject({ user: { name: 'Ada Lovelace' } })
    expect((await fresh.modeller.client.patch('/api/account', { name: '' })).status).toBe(400)
  })

  it('takes another password from whoever knows that of today, and signs out other browsers', async () => {
    const fresh = await buildGroup(server)
    const { client, email } = fresh.modeller
    const elsewhere = new ApiClient(server.app)
    await elsewhere.signIn(email, PASSWORD)
    const wrong = await client.post('/api/account/password', { current: OTHER, password: OTHER })
    expect([wrong.status, wrong.body]).toMatchObject([401, { code: 'SIGN_IN_FAILED', field: 'current' }])
    const changed = await client.post('/api/account/password', { current: PASSWORD, password: OTHER })
    expect(changed.status).toBe(200)
    expect((await client.open()).user).toMatchObject({ email })
    expect((await elsewhere.open()).user).toBeNull()
    expect([await status(email, PASSWORD), await status(email, OTHER)]).toEqual([401, 200])
  })

  it('remembers the group it looks at, among those it is in', async () => {
    const [one, other] = [await buildGroup(server), await buildGroup(server)]
    const { client, member } = one.modeller
    await server.dataSource.query(
      `insert into "membership" ("group_id", "user_id", "role") values ($1, $2, 'reviewer')`,
      [other.groupId, member.userId],
    )
    expect((await client.open()).user?.currentGroupId).toBe(one.groupId)
    const choose = (groupId: string) => client.put('/api/account/current-group', { groupId })
    expect((await choose(other.groupId)).status).toBe(204)
    expect((await client.open()).user?.currentGroupId).toBe(other.groupId)
    expect((await choose(group.groupId)).status).toBe(404)
    expect((await client.get(`/api/groups/${one.groupId}/polymers`)).status).toBe(200)
  })

  it('is nobody without a session', async () => {
    const client = await visitor()
    const responses = [
      await client.patch('/api/account', { name: 'X' }),
      await client.post('/api/account/password', { current: PASSWORD, password: OTHER }),
      await client.put('/api/account/current-group', { groupId: group.groupId }),
    ]
    for (const response of responses) {
      expect([response.status, response.body]).toMatchObject([401, { code: 'NOT_SIGNED_IN' }])
    }
  })
})
