import { randomUUID } from 'node:crypto'
import type { Role } from '@shared/contracts/common'
import type { Member } from '../../server/services'
import { ApiClient } from './api-client'
import type { ApiServer } from './api-server'

export const PASSWORD = 'a password for tests'

/** A person of a test group: as services know them, and their browser. */
export interface Person {
  readonly member: Member
  readonly email: string
  readonly client: ApiClient
}

/** A group with one person per role, all signed in. */
export interface TestGroup extends Readonly<Record<Role, Person>> {
  readonly groupId: string
}

const ROLES = ['owner', 'modeller', 'reviewer', 'collaborator'] as const

/** Founds a group of its own name and addresses. */
export async function buildGroup(server: ApiServer, { demo = false } = {}): Promise<TestGroup> {
  const suffix = randomUUID()
  const emails = ROLES.map((role) => `${role}.${suffix}@example.org`)
  const members = await server.services.groups.found({
    name: `Group ${suffix}`,
    demo,
    people: ROLES.map((role, index) => ({
      name: `The ${role}`,
      email: emails[index],
      role,
      password: PASSWORD,
    })),
  })
  const people = await Promise.all(
    ROLES.map(async (role, index) => {
      const client = new ApiClient(server.app)
      const response = await client.signIn(emails[index], PASSWORD)
      if (response.status !== 200) throw new Error(`The ${role} could not sign in: ${response.text}`)
      return [role, { member: members[index], email: emails[index], client }] as const
    }),
  )
  return { groupId: members[0].groupId, ...(Object.fromEntries(people) as Record<Role, Person>) }
}
