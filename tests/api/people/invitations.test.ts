import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Invitation } from '@shared/contracts/people'
import { ApiClient } from '../../support/api-client'
import { type ApiServer, openApiServer } from '../../support/api-server'
import { buildGroup, PASSWORD, type TestGroup } from '../../support/group-builder'
import { latestToken, mailsTo, newAddress } from '../../support/mail-texts'

let server: ApiServer
let group: TestGroup

beforeAll(async () => {
  server = await openApiServer({ demo: true })
  group = await buildGroup(server)
})

afterAll(() => server.close())

async function invite(email: string, role = 'reviewer', from = group): Promise<Invitation> {
  const response = await from.owner.client.post(`/api/groups/${from.groupId}/invitations`, { email, role })
  expect(response.status, response.text).toBe(201)
  return response.body as Invitation
}

async function visitor(): Promise<ApiClient> {
  const client = new ApiClient(server.app)
  await client.open()
  return client
}

const newPerson = { name: 'Ada New', password: PASSWORD }

const openInvitations = async (): Promise<string[]> => {
  const response = await group.owner.client.get(`/api/groups/${group.groupId}/invitations`)
  return (response.body as { invitations: Invitation[] }).invitations.map(({ email }) => email)
}

describe('an invitation', () => {
  it('goes to its address with the name of the group, the role and a link', async () => {
    const email = newAddress()
    const invitation = await invite(` ${email.toUpperCase()} `)
    expect(invitation).toMatchObject({ email, role: 'reviewer', expired: false, sent: 1 })
    const days = (Date.parse(invitation.expiresAt) - Date.now()) / 86_400_000
    expect(days).toBeCloseTo(7, 2)
    const [mail] = await mailsTo(server, email)
    expect(mail.subject).toMatch(/^Invitation to Group /)
    expect(mail.text).toContain('The owner invites you')
    expect(mail.text).toContain('https://beads.example/join/')
  })

  it('lets someone new in by a name and a password, once', async () => {
    const email = newAddress()
    await invite(email, 'modeller')
    const token = await latestToken(server, email, 'join')
    const client = await visitor()
    const offer = await client.get(`/api/join/${token}`)
    expect(offer.body).toMatchObject({ role: 'modeller', email, hasAccount: false, demo: false })
    const joined = await client.post(`/api/join/${token}/account`, newPerson)
    expect(joined.status).toBe(201)
    expect(joined.body).toMatchObject({
      user: { name: 'Ada New', email, currentGroupId: group.groupId, memberships: [{ role: 'modeller' }] },
    })
    expect((await client.get(`/api/groups/${group.groupId}/polymers`)).status).toBe(200)
    expect(await openInvitations()).not.toContain(email)

    const again = await (await visitor()).post(`/api/join/${token}/account`, newPerson)
    expect(again.status).toBe(404)
    expect(again.body).toMatchObject({ code: 'LINK_INVALID', details: { reason: 'used' } })
  })

  it('lets exactly one of several in who use its link at the same moment', async () => {
    const email = newAddress()
    await invite(email)
    const token = await latestToken(server, email, 'join')
    const clients = await Promise.all([1, 2, 3].map(visitor))
    const responses = await Promise.all(
      clients.map((client) => client.post(`/api/join/${token}/account`, newPerson)),
    )
    expect(responses.map(({ status }) => status).sort()).toEqual([201, 404, 404])
  })

  it('lets someone with an account in after signing in, into a second group', async () => {
    const other = await buildGroup(server)
    await invite(group.modeller.email, 'reviewer', other)
    const token = await latestToken(server, group.modeller.email, 'join')
    expect((await (await visitor()).get(`/api/join/${token}`)).body).toMatchObject({ hasAccount: true })
    const asNew = await (await visitor()).post(`/api/join/${token}/account`, newPerson)
    expect(asNew.status).toBe(409)
    expect(asNew.body).toMatchObject({ code: 'NAME_TAKEN', field: 'email' })
    expect((await (await visitor()).post(`/api/join/${token}`)).status).toBe(401)

    const { client } = group.modeller
    const joined = await client.post(`/api/join/${token}`)
    expect(joined.status).toBe(200)
    expect(joined.body).toMatchObject({ user: { currentGroupId: other.groupId } })
    for (const { groupId } of [group, other]) {
      expect((await client.get(`/api/groups/${groupId}/polymers`)).status).toBe(200)
    }
    expect((await client.post(`/api/groups/${other.groupId}/polymers`, {})).status).toBe(403)
  })

  it('does not use up its link on someone who is in the group', async () => {
    const email = newAddress()
    await invite(email)
    const token = await latestToken(server, email, 'join')
    const response = await group.reviewer.client.post(`/api/join/${token}`)
    expect(response.body).toMatchObject({ code: 'ALREADY_MEMBER' })
    expect((await (await visitor()).get(`/api/join/${token}`)).status).toBe(200)
  })

  it('is refused for someone in the group, and for an address that has an open one', async () => {
    const path = `/api/groups/${group.groupId}/invitations`
    const member = { email: group.reviewer.email.toUpperCase(), role: 'modeller' }
    const inGroup = await group.owner.client.post(path, member)
    expect([inGroup.status, inGroup.body]).toMatchObject([409, { code: 'ALREADY_MEMBER', field: 'email' }])
    const email = newAddress()
    await invite(email)
    const twice = await group.owner.client.post(path, { email, role: 'owner' })
    expect([twice.status, twice.body]).toMatchObject([409, { code: 'IN_USE', field: 'email' }])
    expect(await mailsTo(server, email)).toHaveLength(1)
  })

  it.each(['ada', 'ada@example.org\r\nBcc: eve@example.org', 'ada@example.org, eve@example.org', ''])(
    'is refused to %j',
    async (email) => {
      const path = `/api/groups/${group.groupId}/invitations`
      const response = await group.owner.client.post(path, { email, role: 'reviewer' })
      expect([response.status, response.body]).toMatchObject([400, { field: 'email' }])
    },
  )

  it('stays on one line although the name of its group does not', async () => {
    const odd = await buildGroup(server)
    await server.dataSource.query('update "group" set "name" = $2 where "id" = $1', [
      odd.groupId,
      'Soft matter\r\nBcc: eve@example.org',
    ])
    const path = `/api/groups/${odd.groupId}/invitations`
    const response = await odd.owner.client.post(path, { email: newAddress(), role: 'reviewer' })
    expect([response.status, response.body]).toMatchObject([400, { code: 'MAIL_SUBJECT_INVALID' }])
    expect((await odd.owner.client.get(path)).body).toEqual({ invitations: [] })
  })
})

describe('a link that does not work', () => {
  it('is one that nobody made', async () => {
    const response = await (await visitor()).get('/api/join/made-up')
    expect([response.status, response.body]).toMatchObject([
      404,
      { code: 'LINK_INVALID', details: { reason: 'unknown' } },
    ])
  })

  it('is one that was revoked', async () => {
    const email = newAddress()
    const { id } = await invite(email)
    const token = await latestToken(server, email, 'join')
    expect((await group.owner.client.delete(`/api/invitations/${id}`)).status).toBe(204)
    const response = await (await visitor()).post(`/api/join/${token}/account`, newPerson)
    expect([response.status, response.body]).toMatchObject([404, { details: { reason: 'revoked' } }])
    expect((await group.owner.client.delete(`/api/invitations/${id}`)).status).toBe(404)
    expect((await group.owner.client.post(`/api/invitations/${id}/send`)).status).toBe(404)
  })

  it('is one that is out of date; the address can be invited anew', async () => {
    const email = newAddress()
    const { id } = await invite(email)
    const token = await latestToken(server, email, 'join')
    await server.dataSource.query(`update "invitation" set "expires_at" = now() where "id" = $1`, [id])
    const response = await group.modeller.client.post(`/api/join/${token}`)
    expect([response.status, response.body]).toMatchObject([404, { details: { reason: 'expired' } }])
    expect((await invite(email)).id).not.toBe(id)
  })

  it('is the one before, once the invitation was sent again', async () => {
    const email = newAddress()
    const { id } = await invite(email)
    const first = await latestToken(server, email, 'join')
    await server.dataSource.query(`update "invitation" set "expires_at" = now() where "id" = $1`, [id])
    const again = await group.owner.client.post(`/api/invitations/${id}/send`)
    expect(again.body).toMatchObject({ id, sent: 2, expired: false })
    expect(await mailsTo(server, email)).toHaveLength(2)
    const second = await latestToken(server, email, 'join')
    expect((await (await visitor()).get(`/api/join/${first}`)).status).toBe(404)
    expect((await (await visitor()).get(`/api/join/${second}`)).status).toBe(200)
  })

  it('cannot be read out of the database', async () => {
    const email = newAddress()
    await invite(email)
    const token = await latestToken(server, email, 'join')
    const rows = JSON.stringify(await server.dataSource.query('select * from "invitation"'))
    expect(rows).not.toContain(token)
  })
})

describe('the people of the demo', () => {
  it('join no group that is not invented', async () => {
    const demo = await server.services.groups.found({
      name: 'Invented',
      demo: true,
      people: [{ name: 'Bo', email: 'bo@demo.example', role: 'owner', password: null }],
    })
    const email = newAddress()
    await invite(email)
    const token = await latestToken(server, email, 'join')
    const client = await visitor()
    await client.post('/api/session/demo', { userId: demo[0].userId })
    await client.open()
    const response = await client.post(`/api/join/${token}`)
    expect([response.status, response.body]).toMatchObject([403, { code: 'FORBIDDEN' }])
  })
})
