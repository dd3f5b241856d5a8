import { randomUUID } from 'node:crypto'
import request, { type Response } from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { KEY_SCOPES } from '@shared/contracts/key'
import { builtInLayout } from '@shared/layouts'
import { routes } from '../../../server/routes'
import type { AnyRoute } from '../../../server/routes/route'
import { LINK_LIMITS } from '../../../server/middleware/limits'
import { ApiClient } from '../../support/api-client'
import { type ApiServer, openApiServer } from '../../support/api-server'
import { buildDelivery, type Delivery, receivedToken, sendTo } from '../../support/delivery-builder'
import { buildGroup, type TestGroup } from '../../support/group-builder'
import { bondFile } from '../../support/job-builder'
import { scriptOf } from '../../support/key-client'
import { newAddress } from '../../support/mail-texts'
import { nameOf } from '../../support/route-calls'

const LAYOUT = {
  name: 'Mine',
  document: builtInLayout('two-columns', { length: 'nm', angle: 'degree', energy: 'kJ/mol' }),
}

/** Query and body of a valid request, by method and what stands behind the base of the path. */
const SAMPLES: Readonly<
  Record<string, { readonly query?: string; readonly body?: object; readonly upload?: true }>
> = {
  'get ': {},
  'get /archive.zip': {},
  'get /file': { query: 'path=README.txt' },
  'get /written': { query: 'layout=json' },
  'post /written': { body: LAYOUT },
  'post /archive.zip': { body: LAYOUT },
  'post /file': { body: { ...LAYOUT, path: 'bond_A-A_400K.txt' } },
  'post /acknowledgement': { body: { name: 'Rhea Recipient' } },
  'post /questions': { body: { table: null, text: 'Is it at 400 K?' } },
  'post /returned-files': { body: { table: 'A–A' }, upload: true },
}

const families = { link: '/api/received/:token', recipient: '/api/hand-overs/:handOverId/received' }
const routesOf = (access: keyof typeof families) =>
  routes
    .filter((route) => route.access === access)
    .map((route) => ({ name: nameOf(route), route, base: families[access] }))

let server: ApiServer
let group: TestGroup
let strangers: TestGroup
/** One that the collaborator has, and one whose delivery to them was revoked. */
let open: Delivery
let revoked: Delivery

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  strangers = await buildGroup(server)
  open = await buildDelivery(server, group, { email: group.collaborator.email })
  revoked = await buildDelivery(server, group, { email: group.collaborator.email })
  await server.services.recipients.revoke(group.owner.member, revoked.recipientId)
}, 60_000)

afterAll(() => server.close())

async function call(client: ApiClient, route: AnyRoute, base: string, filled: string): Promise<Response> {
  const rest = route.path.slice(base.length)
  const { query, body, upload } = SAMPLES[`${route.method} ${rest}`]
  const path = `${filled}${rest}${query === undefined ? '' : `?${query}`}`
  return upload ? client.upload(path, body, bondFile()) : client.send(route.method, path, body)
}

const ofAccount = (id: string): string => `/api/hand-overs/${id}/received`
/** Another link to a hand-over that is out. */
const newLink = async () => {
  const email = newAddress()
  const { recipients } = await sendTo(server, group, open.handOver.id, email)
  const recipientId = recipients.find((each) => each.email === email)?.id ?? ''
  return { email, recipientId, token: await receivedToken(server, email), handOver: open.handOver }
}

describe('what was handed over to an account', () => {
  it('has a sample for every route', () => {
    const rests = routesOf('recipient').map(
      ({ route, base }) => `${route.method} ${route.path.slice(base.length)}`,
    )
    expect(rests.sort()).toEqual(Object.keys(SAMPLES).sort())
    expect(routesOf('link')).toHaveLength(rests.length)
  })

  it.each(routesOf('recipient'))(
    '$name works for a collaborator whom it was sent to',
    async ({ route, base }) => {
      const response = await call(group.collaborator.client, route, base, ofAccount(open.handOver.id))
      expect(response.status, response.text).toBe(route.answer.status)
    },
  )

  it.each(routesOf('recipient'))(
    '$name: to everyone else it is not there, whatever their role, and to the recipient no more once it is revoked',
    async ({ route, base }) => {
      const path = ofAccount(revoked.handOver.id)
      const people = [group.owner, group.modeller, group.reviewer, group.collaborator, strangers.owner]
      for (const { client } of people) {
        const response = await call(client, route, base, path)
        expect(response.status).toBe(404)
        expect(response.body).toMatchObject({ code: 'NOT_FOUND' })
      }
      const missing = await call(group.collaborator.client, route, base, ofAccount(randomUUID()))
      expect(missing.status).toBe(404)
    },
  )

  it.each(routesOf('recipient'))(
    '$name asks whoever is not signed in to sign in, and is closed to keys',
    async (each) => {
      const { handOver } = open
      const visitor = new ApiClient(server.app)
      await visitor.open()
      const response = await call(visitor, each.route, each.base, ofAccount(handOver.id))
      expect(response.status).toBe(401)
      const script = await scriptOf(server, group.collaborator.member.userId, [...KEY_SCOPES])
      const rest = each.route.path.slice(each.base.length)
      const byKey = await script.send(each.route.method, `${ofAccount(handOver.id)}${rest}`)
      expect(byKey.body).toMatchObject({ code: 'KEY_NOT_ALLOWED' })
    },
  )

  it.each(routesOf('recipient').filter(({ route }) => route.method === 'post'))(
    '$name is refused without the token of the session',
    async ({ route, base }) => {
      const { handOver } = open
      const path = `${ofAccount(handOver.id)}${route.path.slice(base.length)}`
      const response = await group.collaborator.client.raw('post', path).send({})
      expect(response.body).toMatchObject({ code: 'CSRF_TOKEN_INVALID' })
    },
  )

  it('is listed for its recipient alone, and not to a collaborator whom nothing was sent to', async () => {
    const { handOver } = await buildDelivery(server, strangers, { email: strangers.collaborator.email })
    const listed = async ({ client }: { client: ApiClient }): Promise<string[]> => {
      const list = (await client.get('/api/received')).body as { handOvers: { id: string }[] }
      return list.handOvers.map(({ id }) => id)
    }
    expect(await listed(strangers.collaborator)).toEqual([handOver.id])
    expect(await listed(strangers.owner)).toEqual([])
    const visitor = new ApiClient(server.app)
    await visitor.open()
    expect((await visitor.get('/api/received')).status).toBe(401)
  })

  it('does not open the rest of the group to a collaborator', async () => {
    const { handOver } = open
    const { client } = group.collaborator
    for (const path of ['', '/release', '/deliveries', '/archive.zip']) {
      expect((await client.get(`/api/hand-overs/${handOver.id}${path}`)).status).toBe(403)
    }
  })
})

describe('a link', () => {
  it.each(routesOf('link'))(
    '$name works without session and without token of one',
    async ({ route, base }) => {
      const { token } = await newLink()
      const rest = route.path.slice(base.length)
      const { query, body, upload } = SAMPLES[`${route.method} ${rest}`]
      const url = `/api/received/${token}${rest}${query === undefined ? '' : `?${query}`}`
      const file = bondFile()
      const response = upload
        ? await request(server.app)
            .post(url)
            .field('settings', JSON.stringify(body))
            .attach('file', Buffer.from(file.text), file.name)
        : await request(server.app)[route.method](url).send(body)
      expect(response.status, response.text).toBe(route.answer.status)
      expect(response.headers['set-cookie']).toBeUndefined()
    },
  )

  it('says what is wrong with it: unknown, replaced, revoked, out of date', async () => {
    const { token, recipientId, email, handOver } = await newLink()
    const reasonOf = async (each: string): Promise<unknown> => {
      const response = await request(server.app).get(`/api/received/${each}`)
      expect(response.status).toBe(404)
      expect(response.body).toMatchObject({ code: 'LINK_INVALID' })
      return (response.body as { details: { reason: string } }).details.reason
    }
    expect(await reasonOf(`${token.slice(0, -1)}x`)).toBe('unknown')
    await server.services.recipients.sendAgain(group.modeller.member, recipientId, 1)
    expect(await reasonOf(token)).toBe('revoked')
    const { token: second, recipientId: other } = await newLink()
    await server.dataSource.query(`update "recipient" set "expires_at" = now() where "id" = $1`, [other])
    expect(await reasonOf(second)).toBe('expired')
    await server.services.recipients.extend(group.modeller.member, other, 5)
    expect((await request(server.app).get(`/api/received/${second}`)).status).toBe(200)
    await server.services.recipients.revoke(group.modeller.member, other)
    expect(await reasonOf(second)).toBe('revoked')
    await expect(sendTo(server, group, handOver.id, email)).rejects.toMatchObject({ code: 'IN_USE' })
  })

  it('is in no line of the log, nor kept in the database or in a sent e-mail’s row', async () => {
    const { token } = await newLink()
    await request(server.app).get(`/api/received/${token}`)
    await request(server.app).get(`/api/received/${token}/file?path=nothing.txt`)
    await request(server.app).get(`/received/${token}`)
    expect(server.log()).toContain('/api/received/[token]/file')
    expect(server.log()).not.toContain(token)
    const rows: object[] = await server.dataSource.query(
      `select * from "recipient" where "token_sha256" = $1`,
      [token],
    )
    expect(rows).toEqual([])
  })

  it('tells no page that is left for another site where it came from', async () => {
    const { token } = await newLink()
    const { headers } = await request(server.app).get(`/api/received/${token}`)
    expect(headers['referrer-policy']).toBe('same-origin')
    expect(headers['cache-control']).toBe('no-store')
  })

  it('cannot be guessed on and on', async () => {
    const own = await openApiServer()
    const wrong = (): request.Test => request(own.app).get(`/api/received/${randomUUID()}`)
    for (let attempt = 0; attempt < LINK_LIMITS.perAddress; attempt++)
      expect((await wrong()).status).toBe(404)
    expect((await wrong()).body).toMatchObject({ code: 'TOO_MANY_ATTEMPTS' })
    await own.close()
  })
})
