import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest'
import type { GroupMember } from '@shared/contracts/people'
import { type ApiServer, openApiServer } from '../../support/api-server'
import { buildGroup, type Person, type TestGroup } from '../../support/group-builder'

let server: ApiServer
let group: TestGroup
let path: string

beforeAll(async () => {
  server = await openApiServer()
})

beforeEach(async () => {
  group = await buildGroup(server)
  path = `/api/groups/${group.groupId}`
})

afterAll(() => server.close())

const idOf = ({ member }: Person): string => member.userId
const changeRole = (by: Person, who: Person, role: string) =>
  by.client.patch(`${path}/members/${idOf(who)}`, { role })

async function rolesOf(): Promise<Record<string, string>> {
  const rows: { userId: string; role: string }[] = await server.dataSource.query(
    `select "user_id" as "userId", "role" from "membership" where "group_id" = $1`,
    [group.groupId],
  )
  return Object.fromEntries(rows.map(({ userId, role }) => [userId, role]))
}

describe('the members of a group', () => {
  it('are all shown to whoever sees its work, and to a collaborator only themselves', async () => {
    const response = await group.reviewer.client.get(`${path}/members`)
    const { members } = response.body as { members: GroupMember[] }
    expect(members.map(({ role }) => role).sort()).toEqual(['collaborator', 'modeller', 'owner', 'reviewer'])
    const own = await group.collaborator.client.get(`${path}/members`)
    expect(own.body).toMatchObject({ members: [{ email: group.collaborator.email }] })
    expect((own.body as { members: unknown[] }).members).toHaveLength(1)
  })

  it('get another role from an owner, and may at once what it allows', async () => {
    const response = await changeRole(group.owner, group.collaborator, 'modeller')
    expect(response.body).toMatchObject({ role: 'modeller', person: { id: idOf(group.collaborator) } })
    const polymer = await group.collaborator.client.post(`${path}/polymers`, { name: 'X', smiles: '*CC*' })
    expect(polymer.status).toBe(201)
  })

  it('may no more at once what their role of before allowed', async () => {
    await changeRole(group.owner, group.modeller, 'reviewer')
    const response = await group.modeller.client.post(`${path}/polymers`, { name: 'X', smiles: '*CC*' })
    expect(response.status).toBe(403)
  })

  it('leave, and see nothing of the group any more', async () => {
    expect((await group.modeller.client.post(`${path}/leave`)).status).toBe(204)
    expect((await group.modeller.client.get(`${path}/polymers`)).status).toBe(404)
    expect((await group.modeller.client.open()).user).toMatchObject({ memberships: [], currentGroupId: null })
  })

  it('are taken out by an owner, and see nothing of the group any more', async () => {
    const { status } = await group.owner.client.delete(`${path}/members/${idOf(group.reviewer)}`)
    expect(status).toBe(204)
    expect((await group.reviewer.client.get(`${path}/polymers`)).status).toBe(404)
  })

  it('are not found where they are none', async () => {
    const strangers = await buildGroup(server)
    for (const userId of [idOf(strangers.modeller), randomUUID(), 'x']) {
      const change = await group.owner.client.patch(`${path}/members/${userId}`, { role: 'owner' })
      const removal = await group.owner.client.delete(`${path}/members/${userId}`)
      expect([userId, change.status, removal.status]).toEqual([userId, 404, 404])
    }
  })

  it('have one of the four roles', async () => {
    const response = await changeRole(group.owner, group.modeller, 'king')
    expect([response.status, response.body]).toMatchObject([400, { field: 'role' }])
  })
})

describe('the last owner', () => {
  it('cannot leave, step down or be taken out', async () => {
    const responses = [
      await group.owner.client.post(`${path}/leave`),
      await changeRole(group.owner, group.owner, 'modeller'),
      await group.owner.client.delete(`${path}/members/${idOf(group.owner)}`),
    ]
    for (const response of responses) {
      expect([response.status, response.body]).toMatchObject([409, { code: 'LAST_OWNER' }])
    }
    expect((await rolesOf())[idOf(group.owner)]).toBe('owner')
  })

  it('can go once someone else is an owner', async () => {
    await changeRole(group.owner, group.modeller, 'owner')
    expect((await group.owner.client.post(`${path}/leave`)).status).toBe(204)
    expect((await group.modeller.client.post(`${path}/leave`)).status).toBe(409)
  })

  it.each([
    ['leave', 'leave'],
    ['leave', 'step down'],
    ['step down', 'step down'],
    ['take each other out', 'take each other out'],
  ])('is one of two who %s and %s at the same moment', async (first, second) => {
    for (let round = 0; round < 5; round++) {
      group = await buildGroup(server)
      path = `/api/groups/${group.groupId}`
      await changeRole(group.owner, group.modeller, 'owner')
      const act = (self: Person, other: Person, what: string) => {
        if (what === 'leave') return self.client.post(`${path}/leave`)
        if (what === 'step down') return changeRole(self, self, 'reviewer')
        return self.client.delete(`${path}/members/${idOf(other)}`)
      }
      const responses = await Promise.all([
        act(group.owner, group.modeller, first),
        act(group.modeller, group.owner, second),
      ])
      const owners = Object.values(await rolesOf()).filter((role) => role === 'owner')
      expect([owners.length, responses.filter(({ status }) => status < 300).length]).toEqual([1, 1])
    }
  })
})
