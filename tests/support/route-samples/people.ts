import { randomUUID } from 'node:crypto'
import { HOUSE_DEFAULTS } from '@shared/contracts/group'
import type { RouteSamples, SampleWorld } from './sample'

const ROLES = ['owner', 'modeller', 'reviewer', 'collaborator'] as const

/** A group of its own with the same people in the same roles, and two more: what changes who is in it harms no other test. */
async function twin({ server, group }: SampleWorld) {
  const [owner, extra] = await server.services.groups.found({
    name: `Twin ${randomUUID()}`,
    demo: false,
    people: (['owner', 'modeller'] as const).map((role) => {
      return { name: `Another ${role}`, email: `${randomUUID()}@example.org`, role, password: null }
    }),
  })
  const { groupId } = owner
  for (const role of ROLES) {
    await server.dataSource.query(
      `insert into "membership" ("group_id", "user_id", "role") values ($1, $2, $3)`,
      [groupId, group[role].member.userId, role],
    )
  }
  return { groupId, userId: extra.userId }
}

async function invitationId({ server, group }: SampleWorld): Promise<string> {
  const email = `${randomUUID()}@example.org`
  return (await server.services.invitations.invite(group.owner.member, { email, role: 'reviewer' })).id
}

/** The group itself: people, invitations, defaults, history. */
export const peopleSamples: RouteSamples = {
  'get /api/groups/:groupId': () => ({}),
  'patch /api/groups/:groupId': async (world) => ({
    ids: await twin(world),
    body: { revision: 1, defaults: HOUSE_DEFAULTS },
  }),
  'get /api/groups/:groupId/members': () => ({}),
  'patch /api/groups/:groupId/members/:userId': async (world) => ({
    ids: await twin(world),
    body: { role: 'reviewer' },
  }),
  'delete /api/groups/:groupId/members/:userId': async (world) => ({ ids: await twin(world) }),
  'post /api/groups/:groupId/leave': async (world) => ({ ids: await twin(world) }),
  'get /api/groups/:groupId/invitations': () => ({}),
  'post /api/groups/:groupId/invitations': () => ({
    body: { email: `${randomUUID()}@example.org`, role: 'modeller' },
  }),
  'post /api/invitations/:invitationId/send': async (world) => ({
    ids: { invitationId: await invitationId(world) },
  }),
  'delete /api/invitations/:invitationId': async (world) => ({
    ids: { invitationId: await invitationId(world) },
  }),
  'get /api/groups/:groupId/mails': () => ({}),
  'get /api/groups/:groupId/history': () => ({ query: 'action=polymer%20added' }),
  'get /api/groups/:groupId/history.csv': () => ({}),
}
