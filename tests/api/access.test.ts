import { randomUUID } from 'node:crypto'
import type { Response } from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { DEFAULT_INVERSION_SETTINGS } from '@shared/inversion'
import { routes } from '../../server/routes'
import { type AnyRoute, type MemberAccess, ROLES_FOR } from '../../server/routes/route'
import { ApiClient } from '../support/api-client'
import { type ApiServer, openApiServer } from '../support/api-server'
import { buildGroup, type TestGroup } from '../support/group-builder'
import {
  ANGLE_SETTINGS,
  angleFile,
  buildJob,
  DOCUMENT,
  JOINT_SETTINGS,
  type Job,
  jointFile,
} from '../support/job-builder'
import { callRoute, nameOf, pathOf, worldFor } from '../support/route-calls'
import { ROUTE_SAMPLES, type SampleWorld } from '../support/route-samples'

type MemberRoute = AnyRoute & { readonly access: MemberAccess }

const memberRoutes = routes.filter((route): route is MemberRoute => typeof route.access === 'object')
const named = memberRoutes.map((route) => ({ name: nameOf(route), route }))
const ROLES = ROLES_FOR.belong
const everyRole = named.flatMap(({ name, route }) => ROLES.map((role) => ({ name, route, role })))
const isAllowed = (route: MemberRoute, role: (typeof ROLES)[number]): boolean =>
  (ROLES_FOR[route.access.may] as readonly string[]).includes(role)

let server: ApiServer
let group: TestGroup
let strangers: TestGroup
let shared: Job
/** A second mapping of the shared polymer. */
let otherMappingId: string

beforeAll(async () => {
  server = await openApiServer()
  group = await buildGroup(server)
  strangers = await buildGroup(server)
  shared = await buildJob(server.services, group.modeller.member)
  const other = { name: 'Two beads again', document: DOCUMENT }
  otherMappingId = (await server.services.mappings.create(group.modeller.member, shared.polymerId, other)).id
})

afterAll(() => server.close())

const worldOf = (job: Job): SampleWorld => ({ server, group, job, otherMappingId })
const call = (client: ApiClient, route: AnyRoute, job: Job, path?: string): Promise<Response> =>
  callRoute(client, route, worldOf(job), path)

describe('who may do what', () => {
  it('is tried out for every route of the API', () => {
    expect(Object.keys(ROUTE_SAMPLES).sort()).toEqual(memberRoutes.map(nameOf).sort())
    expect(
      routes
        .filter(({ access }) => typeof access !== 'object')
        .map(nameOf)
        .sort(),
    ).toEqual([
      'delete /api/keys/:keyId',
      'delete /api/session',
      'get /api/hand-overs/:handOverId/received',
      'get /api/hand-overs/:handOverId/received/archive.zip',
      'get /api/hand-overs/:handOverId/received/file',
      'get /api/hand-overs/:handOverId/received/written',
      'get /api/health',
      'get /api/join/:token',
      'get /api/key',
      'get /api/keys',
      'get /api/openapi.json',
      'get /api/password-resets/:token',
      'get /api/received',
      'get /api/received/:token',
      'get /api/received/:token/archive.zip',
      'get /api/received/:token/file',
      'get /api/received/:token/written',
      'get /api/session',
      'get /api/set-up/:token',
      'get /api/tray',
      'patch /api/account',
      'post /api/account/password',
      'post /api/hand-overs/:handOverId/received/acknowledgement',
      'post /api/hand-overs/:handOverId/received/archive.zip',
      'post /api/hand-overs/:handOverId/received/file',
      'post /api/hand-overs/:handOverId/received/questions',
      'post /api/hand-overs/:handOverId/received/returned-files',
      'post /api/hand-overs/:handOverId/received/written',
      'post /api/join/:token',
      'post /api/join/:token/account',
      'post /api/keys',
      'post /api/password-resets',
      'post /api/password-resets/:token',
      'post /api/received/:token/acknowledgement',
      'post /api/received/:token/archive.zip',
      'post /api/received/:token/file',
      'post /api/received/:token/questions',
      'post /api/received/:token/returned-files',
      'post /api/received/:token/written',
      'post /api/session',
      'post /api/session/demo',
      'post /api/set-up',
      'put /api/account/current-group',
    ])
  })

  it.each(everyRole.filter(({ route, role }) => isAllowed(route, role)))(
    '$name works for the $role',
    async ({ route, role }) => {
      const { job } = await worldFor(route, worldOf(shared))
      const response = await call(group[role].client, route, job)
      expect(response.status, response.text).toBe(route.answer.status)
    },
  )

  it.each(everyRole.filter(({ route, role }) => !isAllowed(route, role)))(
    '$name is refused to the $role',
    async ({ route, role }) => {
      const response = await call(group[role].client, route, shared)
      expect(response.status).toBe(403)
      expect(response.body).toMatchObject({ code: 'FORBIDDEN' })
    },
  )

  it.each(named)('$name: for the owner of another group there is nothing there', async ({ route }) => {
    const response = await call(strangers.owner.client, route, shared)
    const missing = await call(
      strangers.owner.client,
      route,
      shared,
      route.path.replace(/:\w+/g, () => randomUUID()),
    )
    expect(response.status).toBe(404)
    const { requestId, ...body } = response.body as Record<string, unknown>
    expect(requestId).toEqual(expect.any(String))
    expect({ ...(missing.body as object), requestId: undefined }).toEqual({ ...body, requestId: undefined })
  })

  it.each(named)('$name asks whoever is not signed in to sign in', async ({ route }) => {
    const visitor = new ApiClient(server.app)
    await visitor.open()
    const response = await call(visitor, route, shared)
    expect(response.status).toBe(401)
    expect(response.body).toMatchObject({ code: 'NOT_SIGNED_IN' })
  })

  it.each(named.filter(({ route }) => route.method !== 'get'))(
    '$name is refused without the token of the session, and with another one',
    async ({ route }) => {
      const world = worldOf(shared)
      const { ids, body } = await ROUTE_SAMPLES[nameOf(route)](world)
      const path = pathOf(route, world, ids)
      const { client } = group.owner
      const without = await client.raw(route.method, path).send(body)
      const wrong = await client
        .raw(route.method, path)
        .set('X-CSRF-Token', strangers.owner.client.csrfToken)
        .send(body)
      for (const response of [without, wrong]) {
        expect(response.status).toBe(403)
        expect(response.body).toMatchObject({ code: 'CSRF_TOKEN_INVALID' })
      }
    },
  )

  it.each(named)('$name: an id that is none is not found', async ({ route }) => {
    for (const id of [
      '1',
      'x'.repeat(300),
      "'; drop table polymer; --",
      '00000000-0000-0000-0000-00000000000g',
    ]) {
      const path = route.path.replace(/:\w+/g, () => encodeURIComponent(id))
      const response = await call(group.owner.client, route, shared, path)
      expect([id, response.status]).toEqual([id, 404])
    }
  })
})

describe('ids named in the content of a request', () => {
  it('do not reach into another group', async () => {
    const job = await buildJob(server.services, strangers.modeller.member)
    const { client } = group.modeller
    const distribution = await client.upload(
      `/api/terms/${shared.angleId}/distributions`,
      { statePointId: job.statePointId, settings: ANGLE_SETTINGS },
      angleFile(),
    )
    expect(distribution.status).toBe(404)
    expect(distribution.body).toMatchObject({ code: 'NOT_FOUND', field: 'statePointId' })
    const joint = await client.upload(
      `/api/mappings/${shared.mappingId}/joint-distributions`,
      {
        firstTermId: job.bondId,
        secondTermId: shared.angleId,
        statePointId: shared.statePointId,
        settings: JOINT_SETTINGS,
      },
      jointFile(),
    )
    expect(joint.status).toBe(404)
    const potential = await client.put(`/api/terms/${shared.bondId}/potential`, {
      statePointId: job.statePointId,
      revision: null,
      settings: DEFAULT_INVERSION_SETTINGS,
    })
    expect(potential.status).toBe(404)
    for (const path of [`mappings/${shared.mappingId}/terms`, `mappings/${shared.mappingId}/pairs`]) {
      expect((await client.get(`/api/${path}?statePoint=${job.statePointId}`)).status).toBe(404)
    }
    const both = `mappings=${shared.mappingId},${job.mappingId}&statePoint=${shared.statePointId}`
    const comparison = await client.get(`/api/polymers/${shared.polymerId}/comparison?${both}`)
    expect(comparison.status).toBe(404)
    expect(comparison.body).toMatchObject({ code: 'NOT_FOUND', field: 'mappings' })
    for (const path of [`terms/${shared.bondId}/table`, `mappings/${shared.mappingId}/tables.zip`]) {
      expect((await client.get(`/api/${path}?statePoint=${job.statePointId}`)).status).toBe(404)
    }
  })

  it('do not mix the polymers of one group', async () => {
    const other = await buildJob(server.services, group.modeller.member)
    const response = await group.modeller.client.upload(
      `/api/terms/${shared.angleId}/distributions`,
      { statePointId: other.statePointId, settings: ANGLE_SETTINGS },
      angleFile(),
    )
    expect(response.status).toBe(404)
    const joint = await group.modeller.client.upload(
      `/api/mappings/${shared.mappingId}/joint-distributions`,
      {
        firstTermId: other.bondId,
        secondTermId: shared.angleId,
        statePointId: shared.statePointId,
        settings: JOINT_SETTINGS,
      },
      jointFile(),
    )
    expect(joint.body).toMatchObject({ code: 'NOT_FOUND', field: 'firstTermId' })
  })

  it('leave the records of a group as they were after strangers tried', async () => {
    const response = await group.owner.client.get(`/api/polymers/${shared.polymerId}`)
    expect(response.body).toMatchObject({
      revision: 1,
      counts: { distributions: 1, potentials: 1, mappings: 2 },
    })
  })
})
