import { randomUUID } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { KEY_SCOPES, type KeyScope } from '@shared/contracts/key'
import { routes } from '../../server/routes'
import { keyScopeOf } from '../../server/routes/key-scope'
import { type AnyRoute, type MemberAccess, ROLES_FOR } from '../../server/routes/route'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import { buildJob, DOCUMENT } from '../support/job-builder'
import { type KeyClient, scriptOf } from '../support/key-client'
import { callRoute, nameOf, worldFor } from '../support/route-calls'
import type { SampleWorld } from '../support/route-samples'

type MemberRoute = AnyRoute & { readonly access: MemberAccess }

const ROLES = ROLES_FOR.belong
const memberRoutes = routes.filter((route): route is MemberRoute => typeof route.access === 'object')
const named = memberRoutes.map((route) => ({ name: nameOf(route), route, needs: keyScopeOf(route) }))
const everyScope = named.flatMap((each) => KEY_SCOPES.map((scope) => ({ ...each, scope })))
const open = named.filter(({ needs }) => needs !== null)
const refusedRoles = open.flatMap((each) =>
  ROLES.filter((role) => !(ROLES_FOR[each.route.access.may] as readonly string[]).includes(role)).map(
    (role) => ({ ...each, role }),
  ),
)

let server: ApiServer
let world: SampleWorld
let strangers: TestGroup
let ownersScripts: Record<KeyScope, KeyClient>
let everything: Record<(typeof ROLES)[number], KeyClient>
let strangersScript: KeyClient

beforeAll(async () => {
  server = await openApiServer()
  const group = await buildGroup(server)
  strangers = await buildGroup(server)
  const job = await buildJob(server.services, group.modeller.member)
  const other = { name: 'Two beads again', document: DOCUMENT }
  const { id } = await server.services.mappings.create(group.modeller.member, job.polymerId, other)
  world = { server, group, job, otherMappingId: id }
  const ofOwner = KEY_SCOPES.map(async (scope) => {
    return [scope, await scriptOf(server, group.owner.member.userId, [scope])] as const
  })
  ownersScripts = Object.fromEntries(await Promise.all(ofOwner)) as typeof ownersScripts
  const ofRoles = ROLES.map(async (role) => {
    return [role, await scriptOf(server, group[role].member.userId, [...KEY_SCOPES])] as const
  })
  everything = Object.fromEntries(await Promise.all(ofRoles)) as typeof everything
  strangersScript = await scriptOf(server, strangers.owner.member.userId, [...KEY_SCOPES])
})

afterAll(() => server.close())

describe('what a key opens', () => {
  it.each(everyScope.filter(({ scope, needs }) => scope === needs))(
    '$name is open to the scope $scope',
    async ({ route, scope }) => {
      const response = await callRoute(ownersScripts[scope], route, await worldFor(route, world))
      expect(response.status, response.text).toBe(route.answer.status)
      expect(response.headers['set-cookie']).toBeUndefined()
    },
  )

  it.each(everyScope.filter(({ scope, needs }) => needs !== null && scope !== needs))(
    '$name is closed to the scope $scope alone',
    async ({ route, scope, needs }) => {
      const response = await callRoute(ownersScripts[scope], route, world)
      expect(response.status).toBe(403)
      expect(response.body).toMatchObject({ code: 'KEY_SCOPE_MISSING' })
      expect(response.headers['www-authenticate']).toContain(`scope="${needs}"`)
    },
  )

  it.each(everyScope.filter(({ needs }) => needs === null))(
    '$name is closed to every key, also with the scope $scope',
    async ({ route, scope }) => {
      const response = await callRoute(ownersScripts[scope], route, world)
      expect(response.status).toBe(403)
      expect(response.body).toMatchObject({ code: 'KEY_NOT_ALLOWED' })
    },
  )

  it.each(refusedRoles)('$name stays refused to the $role who comes with a key', async ({ route, role }) => {
    const response = await callRoute(everything[role], route, world)
    expect(response.status).toBe(403)
    expect(response.body).toMatchObject({ code: 'FORBIDDEN' })
  })

  it.each(open)('$name: a key from another group finds nothing there', async ({ route }) => {
    const response = await callRoute(strangersScript, route, world)
    expect(response.status).toBe(404)
    expect(response.body).toMatchObject({ code: 'NOT_FOUND' })
  })

  it.each(
    routes
      .filter(({ access }) => access === 'visitor' || access === 'person')
      .map((route) => ({ name: nameOf(route), route })),
  )('$name is for people, not for keys', async ({ route }) => {
    const path = route.path.replace(/:\w+/g, () => randomUUID())
    const response = await everything.owner.send(route.method, path)
    expect(response.status).toBe(403)
    expect(response.body).toMatchObject({ code: 'KEY_NOT_ALLOWED' })
  })
})

describe('the rules for keys', () => {
  it('leave the management of groups, people, sessions and keys to people', () => {
    const closed =
      /\/(session|keys|account|members|invitations|mails|history|leave|set-up|join|password-resets)\b/
    const opened = routes.filter((route) => keyScopeOf(route) !== null && closed.test(route.path))
    expect(opened.map(nameOf)).toEqual([])
    for (const { name, route, needs } of named) {
      if (['manage', 'review'].includes(route.access.may)) expect([name, needs]).toEqual([name, null])
    }
  })

  it('ask for no scope that changes anything where a route reads, and for one where it writes', () => {
    for (const { name, route, needs } of open) {
      if (route.method === 'get') expect([name, needs]).toEqual([name, 'read'])
      if (route.access.may === 'write') expect([name, needs]).not.toEqual([name, 'read'])
    }
  })

  it('let a whole job be done: from a polymer to its tables', () => {
    const names = open.map(({ name }) => name)
    expect(names).toEqual(
      expect.arrayContaining([
        'post /api/groups/:groupId/polymers',
        'post /api/polymers/:polymerId/state-points',
        'post /api/polymers/:polymerId/mappings',
        'post /api/terms/:termId/distributions',
        'put /api/terms/:termId/potential',
        'get /api/terms/:termId/table',
        'get /api/mappings/:mappingId/tables.zip',
      ]),
    )
  })
})
